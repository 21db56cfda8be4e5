import { existsSync, mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { findProgram, installDebianPackages, isExecutable, mayInstall } from './debianPackages.mjs'
import { Refusal } from './refusal.mjs'

export const oldestMajor = 15
const debianFolder = '/usr/lib/postgresql'
const noMainCluster = '/etc/postgresql-common/createcluster.d/lathkey.conf'

/**
 * Folders that hold initdb and postgres, newest major first, then whatever PATH offers.
 * @returns {{ folder: string, major: number | undefined }[]}
 */
export function findPostgresPrograms(debian = debianFolder, path = process.env.PATH ?? '') {
  const versions = existsSync(debian) ? readdirSync(debian).map(Number).filter(Number.isInteger) : []
  const found = versions.sort((a, b) => b - a)
    .map(major => ({ folder: join(debian, String(major), 'bin'), major }))
    .filter(({ folder }) => isComplete(folder))
  const onPath = findProgram('initdb', path)
  if (onPath && isComplete(dirname(onPath))) found.push({ folder: dirname(onPath), major: undefined })
  return found
}

const isComplete = folder => ['initdb', 'postgres', 'pg_ctl'].every(name => isExecutable(join(folder, name)))

/**
 * The folder of PostgreSQL's programs; installs them where that is allowed.
 * @param {object} options
 * @param {number} [options.major] the version an existing cluster was made with
 * @param {ReturnType<typeof import('./keeper.mjs').createKeeper>} options.keeper
 * @param {(line: string) => void} options.say
 * @returns {Promise<string>}
 */
export async function ensurePostgresPrograms({ major, keeper, say }) {
  const present = choosePrograms(findPostgresPrograms(), major)
  if (present) return present.folder
  const wanted = major ? `postgresql-${major}` : 'postgresql'
  if (!mayInstall()) {
    throw new Refusal(`PostgreSQL ${major ?? `${oldestMajor} or newer`} is missing. Install it with "sudo apt-get install ${wanted}" (Debian), or set DATABASE_URL to a database that exists. Then run the command again.`)
  }
  await installWithoutMainCluster({ wanted, keeper, say })
  const installed = choosePrograms(findPostgresPrograms(), major)
  if (!installed) throw new Refusal(`${wanted} was installed, but initdb and postgres are not in ${debianFolder}/*/bin.`)
  return installed.folder
}

/** @param {ReturnType<typeof findPostgresPrograms>} found @param {number} [major] */
export function choosePrograms(found, major) {
  return found.find(entry => entry.major === undefined || (major === undefined ? entry.major >= oldestMajor : entry.major === major))
}

/** Debian's package would make and start a cluster of its own; ours is private, so it must not. */
async function installWithoutMainCluster({ wanted, keeper, say }) {
  const isOurs = !existsSync(noMainCluster)
  if (isOurs) {
    mkdirSync(dirname(noMainCluster), { recursive: true })
    writeFileSync(noMainCluster, 'create_main_cluster = false\n')
  }
  const forget = keeper.add(() => isOurs && rmSync(noMainCluster, { force: true }))
  await installDebianPackages({ packages: [wanted], keeper, say })
  if (isOurs) rmSync(noMainCluster, { force: true })
  forget()
}
