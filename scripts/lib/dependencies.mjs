import { lstatSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { Refusal } from './refusal.mjs'

function readJson(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'))
  }
  catch (error) {
    if (error.code === 'ENOENT') return undefined
    throw error
  }
}

/** Optional packages of other platforms, and what nothing needs any more, are not installed. */
const isAbsentByRight = entry => Boolean(entry.optional || entry.devOptional || entry.peer || entry.extraneous)

/**
 * What the lock asks for and node_modules has not, by content: times mean nothing after a fresh checkout.
 * npm writes what it installed to node_modules/.package-lock.json.
 * @param {string} root
 * @returns {string[]} empty when up to date
 */
export function missingDependencies(root) {
  const wanted = readJson(join(root, 'package-lock.json'))
  if (!wanted) throw new Refusal('package-lock.json is missing: this is not a complete copy of the program.')
  const present = readJson(join(root, 'node_modules/.package-lock.json'))?.packages ?? {}
  return Object.entries(wanted.packages)
    .filter(([path, entry]) => path !== '' && !isAbsentByRight(entry) && present[path]?.version !== entry.version)
    .map(([path]) => path.replace('node_modules/', ''))
}

function isLink(path) {
  return lstatSync(path, { throwIfNoEntry: false })?.isSymbolicLink() ?? false
}

/**
 * @param {object} options
 * @param {string} options.root
 * @param {ReturnType<typeof import('./keeper.mjs').createKeeper>} options.keeper
 * @param {(line: string) => void} options.say
 */
export async function installDependencies({ root, keeper, say }) {
  const missing = missingDependencies(root)
  if (missing.length === 0) return
  if (isLink(join(root, 'node_modules'))) {
    throw new Refusal(`node_modules is a link, and what it points to lacks ${missing.slice(0, 5).join(', ')}. Run "npm ci" where it points to.`)
  }
  say(`Installing ${missing.length} packages from the lock file (npm ci) …`)
  const code = await keeper.run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], { cwd: root, stdio: ['ignore', 'inherit', 'inherit'] })
  if (code !== 0) throw new Refusal(`npm ci failed (code ${code}). Its message is above. Check the connection to the npm registry and try again.`)
}
