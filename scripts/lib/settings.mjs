import { join, resolve } from 'node:path'
import { Refusal } from './refusal.mjs'
import { isPortFree } from './ports.mjs'
import { sessionPassword } from './secrets.mjs'

/**
 * What a person set in the environment, completed with our defaults.
 * @param {string} root
 * @param {Record<string, string | undefined>} [env]
 */
export function readSettings(root, env = process.env) {
  const dataDir = resolve(root, env.DATA_DIR || '.data')
  const port = env.PORT ? Number(env.PORT) : undefined
  if (port !== undefined && !(Number.isInteger(port) && port > 0 && port < 65_536)) {
    throw new Refusal(`PORT is "${env.PORT}". It has to be a whole number from 1 to 65535.`)
  }
  const key = env.NUXT_SESSION_PASSWORD
  if (key && key.length < 32) throw new Refusal('NUXT_SESSION_PASSWORD is too short. It needs 32 characters or more. Leave it out to have one made.')
  return {
    dataDir,
    photoDir: resolve(root, env.PHOTO_DIR || join(dataDir, 'photos')),
    host: env.HOST || '127.0.0.1',
    port,
    databaseUrl: env.DATABASE_URL || undefined,
    ownerUrl: env.DATABASE_OWNER_URL || env.DATABASE_URL || undefined,
    smtpUrl: env.SMTP_URL || undefined,
    mailFrom: env.MAIL_FROM || 'Lathkey <post@lathkey.example>',
    appUrl: env.APP_URL || undefined,
    sessionPassword: key || undefined,
    isDemoWanted: env.DEMO !== 'no',
  }
}

/** Asked for: that one or none. Otherwise 3000, or the next that is free. */
export async function choosePort(host, wanted) {
  if (wanted !== undefined) {
    if (await isPortFree(host, wanted)) return wanted
    throw new Refusal(`Port ${wanted} on ${host} is taken or not allowed. Set PORT to another one, or leave it out.`)
  }
  for (let port = 3000; port < 3100; port += 1) {
    if (await isPortFree(host, port)) return port
  }
  throw new Refusal(`No port from 3000 to 3099 is free on ${host}. Set PORT to one that is.`)
}

const everyAddress = new Set(['0.0.0.0', '::', ''])

/** The address to type on this machine. @param {string} host @param {number} port */
export function addressOf(host, port) {
  if (everyAddress.has(host)) return `http://127.0.0.1:${port}`
  return `http://${host.includes(':') ? `[${host}]` : host}:${port}`
}

/**
 * The environment the server runs in.
 * @param {ReturnType<typeof readSettings>} settings
 * @param {{ appUrl: string, ownerUrl: string, smtpUrl: string, port: number }} running
 * @returns {Record<string, string | undefined>}
 */
export function serverEnvironment(settings, { appUrl, ownerUrl, smtpUrl, port }) {
  return {
    ...process.env,
    DATABASE_URL: appUrl,
    DATABASE_OWNER_URL: ownerUrl,
    NUXT_SESSION_PASSWORD: settings.sessionPassword ?? sessionPassword(settings.dataDir),
    SMTP_URL: smtpUrl,
    MAIL_FROM: settings.mailFrom,
    APP_URL: settings.appUrl ?? addressOf(settings.host, port),
    DATA_DIR: settings.dataDir,
    PHOTO_DIR: settings.photoDir,
    HOST: settings.host,
    PORT: String(port),
    NITRO_HOST: settings.host,
    NITRO_PORT: String(port),
  }
}
