import { accessSync, constants } from 'node:fs'
import { delimiter, join } from 'node:path'
import { Refusal } from './refusal.mjs'

/** @param {string} name @returns {string | undefined} */
export function findProgram(name, path = process.env.PATH ?? '') {
  return path.split(delimiter).filter(Boolean).map(folder => join(folder, name)).find(isExecutable)
}

/** @param {string} path */
export function isExecutable(path) {
  try {
    accessSync(path, constants.X_OK)
    return true
  }
  catch {
    return false
  }
}

export const mayInstall = () => process.getuid?.() === 0 && findProgram('apt-get') !== undefined

/**
 * @param {object} options
 * @param {string[]} options.packages
 * @param {ReturnType<typeof import('./keeper.mjs').createKeeper>} options.keeper
 * @param {(line: string) => void} options.say
 */
export async function installDebianPackages({ packages, keeper, say }) {
  say(`Installing ${packages.join(', ')} from Debian's packages …`)
  const steps = [
    ['-qq', 'update'],
    ['-qq', 'install', '-y', '--no-install-recommends', '-o', 'Dpkg::Options::=--force-confold', ...packages],
  ]
  for (const parameters of steps) {
    const { code, output } = await runApt(parameters, keeper)
    if (code !== 0) throw new Refusal(`${output.trimEnd()}\n\napt-get ${parameters[1]} failed (code ${code}). Install ${packages.join(' and ')} by hand, then run the command again.`)
  }
}

/** Its remarks (no terminal, no init system in a container) matter only where it fails. */
async function runApt(parameters, keeper) {
  const apt = keeper.start('apt-get', parameters, {
    // Our temporary folder may be closed to the account apt downloads as.
    env: { ...process.env, TMPDIR: undefined, DEBIAN_FRONTEND: 'noninteractive' }, cwd: '/', stdio: ['ignore', 'pipe', 'pipe'], graceMs: 30_000,
  })
  let output = ''
  for (const stream of [apt.child.stdout, apt.child.stderr]) stream?.setEncoding('utf8').on('data', text => output += text)
  const { code } = await apt.exited
  return { code, output }
}
