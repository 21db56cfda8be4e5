import { spawnSync } from 'node:child_process'
import { chownSync, existsSync, mkdirSync, mkdtempSync, readFileSync, rmdirSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { Refusal } from './refusal.mjs'

/**
 * PostgreSQL refuses to run as root: then it runs as the account that Debian's package made for it.
 * @returns {{ uid: number, gid: number } | undefined} undefined: run as ourselves
 */
export function databaseAccount(passwd = '/etc/passwd') {
  if (process.getuid?.() !== 0) return undefined
  const lines = readFileSync(passwd, 'utf8').split('\n').map(line => line.split(':'))
  const entry = lines.find(([name]) => name === 'postgres') ?? lines.find(([name]) => name === 'nobody')
  if (!entry) throw new Refusal('PostgreSQL cannot run as root, and this machine has no "postgres" account. Run the command as an ordinary user.')
  return { uid: Number(entry[2]), gid: Number(entry[3]) }
}

function canUse(folder, account) {
  const outcome = spawnSync('/bin/sh', ['-c', 'test -w "$0" && test -x "$0"', folder], { ...account, cwd: '/', stdio: 'ignore' })
  return outcome.status === 0
}

function isOwnedBy(folder, account) {
  const found = statSync(folder, { throwIfNoEntry: false })
  return found !== undefined && found.isDirectory() && found.uid === (account?.uid ?? process.getuid?.())
}

/**
 * A folder the database account can work in: the one asked for, or one under the system's temporary folder
 * where a parent of the first is closed to that account.
 * @param {string} wanted
 * @param {{ uid: number, gid: number } | undefined} account
 * @param {string | undefined} earlierFallback where an earlier start had to go
 * @returns {{ folder: string, isFallback: boolean }}
 */
export function prepareDatabaseFolder(wanted, account, earlierFallback) {
  if (earlierFallback && isOwnedBy(earlierFallback, account)) return { folder: earlierFallback, isFallback: true }
  const present = statSync(wanted, { throwIfNoEntry: false })
  if (present && !isOwnedBy(wanted, account)) {
    throw new Refusal(`${wanted} belongs to another account of this machine (number ${present.uid}). Start Lathkey as the account that made it, or set DATA_DIR to a new folder.`)
  }
  mkdirSync(wanted, { recursive: true, mode: 0o700 })
  if (account) chownSync(wanted, account.uid, account.gid)
  if (canUse(wanted, account)) return { folder: wanted, isFallback: false }
  if (present) throw new Refusal(`The account PostgreSQL runs as can no longer enter ${wanted}. Open the folders above it to that account again (chmod o+x).`)
  rmdirSync(wanted)
  return { folder: makeFallback(wanted, account), isFallback: true }
}

/** /var/tmp first: unlike /tmp it is kept over a restart of the machine. */
function makeFallback(wanted, account) {
  for (const parent of ['/var/tmp', '/tmp', tmpdir()].filter(path => existsSync(path))) {
    const folder = mkdtempSync(join(parent, 'lathkey-postgres-'))
    if (account) chownSync(folder, account.uid, account.gid)
    if (canUse(folder, account)) return folder
    rmdirSync(folder)
  }
  throw new Refusal(`The account PostgreSQL runs as cannot use ${wanted}, nor a temporary folder. Set DATA_DIR to a folder it can reach.`)
}
