import { resolve } from 'node:path'
import { afterAll, beforeAll, expect, inject, test } from 'vitest'
import { firstLoadScripts, readClientManifest } from '../../scripts/lib/sizeFirstLoad.mjs'
import { testBuildFolders } from '../../scripts/lib/testFolder.mjs'
import { createClient } from '../support/client'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => {
  server = await startServer()
})
afterAll(() => server.stop())

function outputDir() {
  const { serverEntry } = inject('testServices')
  return serverEntry ? resolve(serverEntry, '../..') : testBuildFolders(resolve(import.meta.dirname, '../..')).outputDir
}

/** Modules in the head that a browser fetches at once; those it may fetch later are marked as prefetch. */
function scriptsOf(html: string) {
  const tags = html.match(/<(?:link|script)\b[^>]*>/g) ?? []
  const atOnce = tags.filter(tag => /\brel="modulepreload"/.test(tag) || (tag.startsWith('<script') && tag.includes('type="module"')))
  return [...new Set(atOnce.map(tag => /_nuxt\/([^"]+\.js)"/.exec(tag)?.[1]).filter(file => file !== undefined))].sort()
}

test('the page of sign-in names exactly the scripts whose size is held', async () => {
  const { status, body } = await createClient(server.url).get<string>('/sign-in')
  expect(status).toBe(200)
  const counted = firstLoadScripts(await readClientManifest(outputDir()), ['layouts/plain.vue', 'pages/sign-in.vue'])
  expect(scriptsOf(body)).toEqual(counted)
})
