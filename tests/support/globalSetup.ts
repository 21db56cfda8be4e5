import { resolve } from 'node:path'
import type { TestProject } from 'vitest/node'
import { createKeeper } from '../../scripts/lib/keeper.mjs'
import { makeTestFolder } from '../../scripts/lib/testFolder.mjs'
import { bringUpTestCluster } from '../../scripts/lib/testServices.mjs'
import { prepareTemplate } from './template'

export interface TestServices {
  adminUrl: string
  ownerUrl: string
  appUrl: string
  folder: string
  /** Absent when vitest was called by itself: then the first test that needs the server builds it. */
  serverEntry: string | undefined
}

declare module 'vitest' {
  interface ProvidedContext { testServices: TestServices }
}

const root = resolve(import.meta.dirname, '../..')

/** `npm test` hands over what it prepared; `npx vitest run --project api` prepares by itself. */
export default async function setup(project: TestProject) {
  const keeper = createKeeper()
  try {
    const say = (line: string) => console.log(line)
    const given = process.env.TEST_DATABASE_ADMIN_URL
      ? process.env
      : await bringUpTestCluster({ folder: makeTestFolder(root, keeper), keeper, say })
    const services = readServices({ ...given, TEST_SERVER_ENTRY: process.env.TEST_SERVER_ENTRY })
    await prepareTemplate(services)
    project.provide('testServices', services)
  }
  catch (error) {
    await keeper.stopAll()
    throw error
  }
  return () => keeper.stopAll()
}

function readServices(env: Record<string, string | undefined>): TestServices {
  const read = (name: string) => {
    const value = env[name]
    if (!value) throw new Error(`${name} is not set, though TEST_DATABASE_ADMIN_URL is.`)
    return value
  }
  return {
    adminUrl: read('TEST_DATABASE_ADMIN_URL'),
    ownerUrl: read('TEST_DATABASE_OWNER_URL'),
    appUrl: read('TEST_DATABASE_APP_URL'),
    folder: read('TEST_FOLDER'),
    serverEntry: env.TEST_SERVER_ENTRY,
  }
}
