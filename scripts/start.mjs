#!/usr/bin/env node
import { join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { bringUpDatabase, bringUpMail, bringUpServer, demoSignIns, migrate, seedWhenEmpty } from './lib/bringUp.mjs'
import { buildIfStale } from './lib/build.mjs'
import { installDependencies } from './lib/dependencies.mjs'
import { createKeeper, stopOnSignals } from './lib/keeper.mjs'
import { tryLock } from './lib/lock.mjs'
import { checkNodeVersion } from './lib/nodeVersion.mjs'
import { Refusal } from './lib/refusal.mjs'
import { addressOf, choosePort, readSettings, serverEnvironment } from './lib/settings.mjs'

const root = resolve(fileURLToPath(import.meta.url), '../..')
const isDev = process.argv.includes('--dev')
const say = line => console.log(line)
const keeper = createKeeper()
let isUp = false

function takeFolder(dataDir) {
  const release = tryLock(join(dataDir, 'start.lock'))
  if (!release) throw new Refusal(`Lathkey is already running on ${dataDir}. Stop it first, or set DATA_DIR to another folder.`)
  keeper.add(release)
}

/** The demo is planted while the program is being built: both take some seconds and neither needs the other. */
async function prepareDatabase(settings) {
  const database = await bringUpDatabase({ settings, keeper, say })
  await migrate({ root, keeper, env: { ...process.env, DATABASE_OWNER_URL: database.ownerUrl } })
  if (settings.isDemoWanted) {
    await seedWhenEmpty({ root, keeper, env: { ...process.env, DATABASE_URL: database.appUrl, DATA_DIR: settings.dataDir, PHOTO_DIR: settings.photoDir } })
  }
  return database
}

async function bringUp() {
  checkNodeVersion(root)
  const settings = readSettings(root)
  takeFolder(settings.dataDir)
  await installDependencies({ root, keeper, say })
  const port = await choosePort(settings.host, settings.port)
  const [database, mail, entry] = await Promise.all([
    prepareDatabase(settings),
    settings.smtpUrl ? { smtpUrl: settings.smtpUrl, inboxUrl: undefined } : bringUpMail({ root, dataDir: settings.dataDir, webPort: port + 1, keeper }),
    isDev ? undefined : buildIfStale({ root, outputDir: join(root, '.output'), buildDir: join(root, '.nuxt'), keeper, say }),
  ])
  const env = serverEnvironment(settings, { ...database, smtpUrl: mail.smtpUrl, port })
  const address = addressOf(settings.host, port)
  const command = entry ? [entry] : [join(root, 'node_modules/nuxt/bin/nuxt.mjs'), 'dev', '--host', settings.host, '--port', String(port)]
  const server = await bringUpServer({ command, cwd: root, env: { ...env, NODE_ENV: isDev ? 'development' : 'production' }, address, keeper, timeoutMs: isDev ? 120_000 : 45_000 })
  isUp = true
  announce({ address, inboxUrl: mail.inboxUrl, signIns: demoSignIns(settings.dataDir) })
  return server
}

function announce({ address, inboxUrl, signIns }) {
  say(`\nLathkey is ready:  ${address}`)
  if (inboxUrl) say(`Its mail arrives:  ${inboxUrl}  (nothing leaves this machine)`)
  if (signIns.length > 0) {
    say('\nSign in to the invented demo with:')
    for (const { role, name, email, password } of signIns) say(`  ${email}  password: ${password}${role || name ? `  (${[role, name].filter(Boolean).join(', ')})` : ''}`)
  }
  say('\nCtrl-C stops it.')
}

stopOnSignals(keeper, signal => (isUp ? 0 : signal === 'SIGINT' ? 130 : 143))
try {
  const server = await bringUp()
  const { code, signal } = await server.exited
  if (!keeper.isStopping()) throw new Refusal(`The server stopped by itself (${signal ?? `code ${code}`}).`)
}
catch (error) {
  // A stop under way makes whatever was being waited for fail; only the first reason counts.
  if (!keeper.isStopping()) {
    console.error(error instanceof Refusal ? `\n${error.message}` : error)
    await keeper.stopAll()
    process.exit(1)
  }
}
