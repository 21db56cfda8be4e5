import pino from 'pino'
import { now } from './clock'

const log = pino({ name: 'lathkey', level: process.env.LOG_LEVEL ?? 'info' }, pino.destination(2))

/** The same trouble is written once a minute at most: a database that is away fails every poll. */
const QUIET_MS = 60_000
const lastWritten = new Map<string, number>()

export function logTrouble(what: string, error: unknown) {
  const at = now().getTime()
  if (at - (lastWritten.get(what) ?? -QUIET_MS) < QUIET_MS) return
  lastWritten.set(what, at)
  log.warn({ reason: error instanceof Error ? error.message : String(error) }, what)
}
