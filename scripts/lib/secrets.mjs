import { randomBytes } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

/**
 * The key that seals session cookies: made on the first start and kept, so that people stay signed in over a restart.
 * @param {string} folder
 */
export function sessionPassword(folder) {
  const file = join(folder, 'session-password')
  if (existsSync(file)) {
    const kept = readFileSync(file, 'utf8').trim()
    if (kept.length >= 32) return kept
  }
  mkdirSync(folder, { recursive: true })
  const made = randomBytes(32).toString('hex')
  writeFileSync(file, `${made}\n`, { mode: 0o600 })
  return made
}
