import { mkdtempSync, rmSync, statSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, expect, test } from 'vitest'
import { findFreePort } from '../../../scripts/lib/ports.mjs'
import { sessionPassword } from '../../../scripts/lib/secrets.mjs'
import { addressOf, choosePort, readSettings, serverEnvironment } from '../../../scripts/lib/settings.mjs'

const folder = mkdtempSync(join(tmpdir(), 'lathkey-settings-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

test('with nothing set, data lies in .data and the program listens on loopback only', () => {
  expect(readSettings('/srv/copy', {})).toMatchObject({
    dataDir: '/srv/copy/.data', photoDir: '/srv/copy/.data/photos', host: '127.0.0.1', port: undefined, databaseUrl: undefined, smtpUrl: undefined, isDemoWanted: true,
  })
})

test('what a person set is used', () => {
  const settings = readSettings('/srv/copy', { DATA_DIR: '/srv/data', HOST: '0.0.0.0', PORT: '8080', DATABASE_URL: 'postgres://db.example/x', SMTP_URL: 'smtp://post.example', DEMO: 'no' })
  expect(settings).toMatchObject({ dataDir: '/srv/data', photoDir: '/srv/data/photos', host: '0.0.0.0', port: 8080, databaseUrl: 'postgres://db.example/x', smtpUrl: 'smtp://post.example', isDemoWanted: false })
  expect(settings.ownerUrl).toBe('postgres://db.example/x')
})

test.each(['http', '0', '70000', '3000.5'])('PORT=%s is refused', (port) => {
  expect(() => readSettings('/srv/copy', { PORT: port })).toThrow('whole number from 1 to 65535')
})

test('a session key that is too short is refused', () => {
  expect(() => readSettings('/srv/copy', { NUXT_SESSION_PASSWORD: 'short' })).toThrow('32 characters')
})

test('the session key is made once, kept, and closed to other accounts', () => {
  const first = sessionPassword(folder)
  expect(first.length).toBeGreaterThanOrEqual(32)
  expect(sessionPassword(folder)).toBe(first)
  expect(statSync(join(folder, 'session-password')).mode & 0o077).toBe(0)
})

test('the address to type names this machine, also when every address is listened on', () => {
  expect([addressOf('0.0.0.0', 3000), addressOf('::1', 3000), addressOf('192.0.2.7', 80)])
    .toEqual(['http://127.0.0.1:3000', 'http://[::1]:3000', 'http://192.0.2.7:80'])
})

test('the server is told everything it needs', () => {
  const settings = readSettings(folder, { DATA_DIR: folder })
  const env = serverEnvironment(settings, { appUrl: 'postgres://app', ownerUrl: 'postgres://owner', smtpUrl: 'smtp://mail', port: 3001 })
  expect(env).toMatchObject({
    DATABASE_URL: 'postgres://app', DATABASE_OWNER_URL: 'postgres://owner', SMTP_URL: 'smtp://mail', APP_URL: 'http://127.0.0.1:3001',
    DATA_DIR: folder, PHOTO_DIR: join(folder, 'photos'), HOST: '127.0.0.1', PORT: '3001', NUXT_SESSION_PASSWORD: sessionPassword(folder),
  })
})

test('a taken port is refused where it was asked for', async () => {
  const port = await findFreePort()
  const holder = createServer().listen(port, '127.0.0.1')
  await new Promise(resolve => holder.once('listening', resolve))
  await expect(choosePort('127.0.0.1', port)).rejects.toThrow(`Port ${port}`)
  await new Promise(resolve => holder.close(resolve))
  expect(await choosePort('127.0.0.1', port)).toBe(port)
})
