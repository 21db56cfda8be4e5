import { existsSync } from 'node:fs'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { createClient, signIn, signUp } from '../support/client'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => {
  server = await startServer()
})
afterAll(() => server.stop())

test('the built server is up with a database of its own', async () => {
  expect(await createClient(server.url).get('/api/health')).toMatchObject({ status: 200 })
})

test('a client keeps its session, and another knows nothing of it', async () => {
  const { client, owner } = await signUp(server.url)
  expect(client.cookies()).not.toEqual([])
  const again = await signIn(server.url, owner)
  expect(again.cookies()).not.toEqual([])
  expect(createClient(server.url).cookies()).toEqual([])
})

test('stopping leaves neither the server nor its folder', async () => {
  const other = await startServer()
  await other.stop()
  expect(existsSync(other.dataDir)).toBe(false)
  await expect(fetch(`${other.url}/api/health`)).rejects.toThrow()
})
