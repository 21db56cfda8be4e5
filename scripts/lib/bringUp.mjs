import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { startCluster } from './cluster.mjs'
import { findFreePort, isPortFree } from './ports.mjs'
import { Refusal } from './refusal.mjs'

/** @typedef {ReturnType<typeof import('./keeper.mjs').createKeeper>} Keeper */

const typescript = ['--import', 'tsx']

/**
 * A person's own database, or a private cluster.
 * @param {{ settings: ReturnType<typeof import('./settings.mjs').readSettings>, keeper: Keeper, say: (line: string) => void }} options
 */
export async function bringUpDatabase({ settings, keeper, say }) {
  if (settings.databaseUrl) return { appUrl: settings.databaseUrl, ownerUrl: settings.ownerUrl ?? settings.databaseUrl }
  const { appUrl, ownerUrl } = await startCluster({ folder: settings.dataDir, keeper, say })
  return { appUrl, ownerUrl }
}

async function runTypescript({ root, keeper, env, file, parameters = [], failure }) {
  const code = await keeper.run(process.execPath, [...typescript, join(root, file), ...parameters], {
    cwd: root, env, stdio: ['ignore', 'inherit', 'inherit'],
  })
  if (code !== 0) throw new Refusal(`${failure} (code ${code}). The message is above.`)
}

/** @param {{ root: string, keeper: Keeper, env: Record<string, string | undefined> }} options */
export function migrate({ root, keeper, env }) {
  return runTypescript({ root, keeper, env, file: 'scripts/migrate.ts', failure: 'The database could not be brought up to date' })
}

/** @param {{ root: string, keeper: Keeper, env: Record<string, string | undefined> }} options */
export async function seedWhenEmpty({ root, keeper, env }) {
  if (!existsSync(join(root, 'scripts/seed.ts'))) return
  await runTypescript({ root, keeper, env, file: 'scripts/seed.ts', parameters: ['--if-empty'], failure: 'The demo could not be made' })
}

/**
 * A mail server that delivers to nobody, and a page to read what it got.
 * @param {{ root: string, dataDir: string, webPort: number, keeper: Keeper }} options
 * @returns {Promise<{ smtpUrl: string, inboxUrl: string }>}
 */
export async function bringUpMail({ root, dataDir, webPort, keeper }) {
  const port = await isPortFree('127.0.0.1', webPort) ? webPort : await findFreePort()
  const mail = keeper.start(process.execPath, [...typescript, join(root, 'fakes/mail/run.ts'), '--folder', join(dataDir, 'mail'), '--web-port', String(port)], {
    cwd: root, env: process.env, stdio: ['ignore', 'pipe', 'inherit'],
  })
  let heard = ''
  for await (const chunk of mail.child.stdout) {
    heard += chunk
    if (heard.includes('\n')) break
  }
  if (!heard.includes('\n')) throw new Refusal('The mail server for trying things out did not start. Its message is above.')
  return JSON.parse(heard)
}

/**
 * Starts the program and waits until it answers for itself and its database.
 * @param {{ command: string[], cwd: string, env: Record<string, string | undefined>, address: string, keeper: Keeper, timeoutMs: number }} options
 */
export async function bringUpServer({ command, cwd, env, address, keeper, timeoutMs }) {
  const server = keeper.start(process.execPath, command, { cwd, env, stdio: ['ignore', 'inherit', 'inherit'], graceMs: 12_000 })
  const deadline = Date.now() + timeoutMs
  while (server.isRunning() && Date.now() < deadline) {
    if (await isHealthy(address)) return server
    await wait(100)
  }
  throw new Refusal(server.isRunning() ? `The server does not answer at ${address}/api/health.` : 'The server stopped while starting. Its message is above.')
}

/** @param {string} address */
export async function isHealthy(address) {
  try {
    const answer = await fetch(`${address}/api/health`, { signal: AbortSignal.timeout(5_000) })
    await answer.arrayBuffer()
    return answer.status === 200
  }
  catch {
    return false
  }
}

/**
 * @param {string} dataDir
 * @returns {{ name?: string, role?: string, email: string, password: string }[]}
 */
export function demoSignIns(dataDir) {
  const file = join(dataDir, 'demo-sign-ins.json')
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : []
}
