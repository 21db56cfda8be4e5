import { chmodSync, mkdirSync, mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { isAlive } from './children.mjs'

/**
 * A folder for one run of tests, removed with the run; those of runs that were cut off go too.
 * @param {string} root
 * @param {ReturnType<typeof import('./keeper.mjs').createKeeper>} keeper
 */
export function makeTestFolder(root, keeper) {
  const parent = join(root, '.test')
  mkdirSync(parent, { recursive: true })
  for (const name of readdirSync(parent)) {
    const pid = Number(/^run-(\d+)-/.exec(name)?.[1])
    if (pid && !isAlive(pid)) rmSync(join(parent, name), { recursive: true, force: true })
  }
  const folder = mkdtempSync(join(parent, `run-${process.pid}-`))
  // mkdtemp closes its folder to others; PostgreSQL may run as another account.
  chmodSync(folder, 0o711)
  keeper.add(() => rmSync(folder, { recursive: true, force: true, maxRetries: 3 }))
  return folder
}

/** Builds for tests lie apart, so that a running `npm start` keeps its own. @param {string} root */
export const testBuildFolders = root => ({ outputDir: join(root, '.test/output'), buildDir: join(root, '.test/nuxt') })
