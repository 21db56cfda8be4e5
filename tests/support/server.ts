import { mkdtemp, rm } from 'node:fs/promises'
import { join, resolve } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { inject } from 'vitest'
import { startFakeMail, type FakeMail } from '../../fakes/mail/startFakeMail'
import { isHealthy } from '../../scripts/lib/bringUp.mjs'
import { startChild } from '../../scripts/lib/children.mjs'
import { createKeeper } from '../../scripts/lib/keeper.mjs'
import { findFreePort } from '../../scripts/lib/ports.mjs'
import { buildForTests } from '../../scripts/lib/testServices.mjs'
import { cloneDatabase, type TestDatabase } from './database'

export interface TestServerOptions {
  /** Added to, or replacing, what the server gets anyway. */
  env?: Record<string, string>
  /** A database of your own outlives the server; so does mail of your own. */
  database?: TestDatabase
  mail?: FakeMail
}

export interface TestServer {
  url: string
  database: TestDatabase
  mail: FakeMail
  /** Where it keeps photos and the like. */
  dataDir: string
  /** All it wrote to its error output so far. */
  stderr: () => string
  stdout: () => string
  /** Ends it as a service manager would, then removes what was made for it. */
  stop: () => Promise<void>
  /** Ends it as a power cut would; stop() still removes the rest. */
  kill: () => Promise<void>
}

/** The databases of the servers that run, by address: some tests look past the program. */
export const databaseAt = new Map<string, TestDatabase>()

let builtEntry: Promise<string> | undefined

function serverEntry() {
  const { serverEntry: given } = inject('testServices')
  return builtEntry ??= given
    ? Promise.resolve(given)
    : buildForTests({ root: resolve(import.meta.dirname, '../..'), keeper: createKeeper(), say: line => console.log(line) })
}

/** The built server, as people will run it, on a database and with mail of its own. */
export async function startServer(options: TestServerOptions = {}): Promise<TestServer> {
  const entry = await serverEntry()
  const database = options.database ?? await cloneDatabase()
  const mail = options.mail ?? await startFakeMail()
  const dataDir = await mkdtemp(join(inject('testServices').folder, 'data-'))
  const cleanUp = async () => {
    if (!options.mail) await mail.close()
    if (!options.database) await database.drop()
    await rm(dataDir, { recursive: true, force: true })
  }
  try {
    const server = await launch(entry, { database, mail, dataDir, env: options.env ?? {} })
    databaseAt.set(server.url, database)
    return {
      ...server, database, mail, dataDir,
      stop: async () => {
        await server.stop()
        await cleanUp()
      },
    }
  }
  catch (error) {
    await cleanUp()
    throw error
  }
}

interface Surroundings { database: TestDatabase, mail: FakeMail, dataDir: string, env: Record<string, string> }

function environmentFor({ database, mail, dataDir, env }: Surroundings, port: number) {
  return {
    PATH: process.env.PATH, HOME: dataDir, TMPDIR: process.env.TMPDIR, NODE_ENV: 'production', TZ: 'UTC',
    DATABASE_URL: database.appUrl, DATABASE_OWNER_URL: database.ownerUrl,
    NUXT_SESSION_PASSWORD: 'a key that seals cookies in tests and nowhere else',
    SMTP_URL: mail.smtpUrl, MAIL_FROM: 'Lathkey <post@lathkey.example>',
    APP_URL: `http://127.0.0.1:${port}`, HOST: '127.0.0.1', PORT: String(port),
    DATA_DIR: dataDir, PHOTO_DIR: join(dataDir, 'photos'),
    ...env,
  }
}

async function launch(entry: string, surroundings: Surroundings, attemptsLeft = 2): Promise<Pick<TestServer, 'url' | 'stderr' | 'stdout' | 'stop' | 'kill'>> {
  const port = await findFreePort()
  const url = `http://127.0.0.1:${port}`
  const server = startChild(process.execPath, [entry], { env: environmentFor(surroundings, port), stdio: ['ignore', 'pipe', 'pipe'] })
  const heard = { stdout: '', stderr: '' }
  server.child.stdout?.setEncoding('utf8').on('data', (text: string) => heard.stdout += text)
  server.child.stderr?.setEncoding('utf8').on('data', (text: string) => heard.stderr += text)
  const deadline = Date.now() + 45_000
  while (server.isRunning() && Date.now() < deadline) {
    if (await isHealthy(url)) {
      return { url, stderr: () => heard.stderr, stdout: () => heard.stdout, stop: server.stop, kill: async () => {
        server.child.kill('SIGKILL')
        await server.exited
      } }
    }
    await wait(50)
  }
  await server.stop()
  // Another process took the port between finding it and listening on it.
  if (heard.stderr.includes('EADDRINUSE') && attemptsLeft > 0) return launch(entry, surroundings, attemptsLeft - 1)
  throw new Error(`The server did not come up at ${url}.\n${heard.stdout}\n${heard.stderr}`)
}
