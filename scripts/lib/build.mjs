import { createHash } from 'node:crypto'
import { closeSync, existsSync, mkdirSync, openSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs'
import { dirname, join, relative } from 'node:path'
import { withLock } from './lock.mjs'
import { Refusal } from './refusal.mjs'

/** Everything the build reads. */
export const buildSources = [
  'app.vue', 'error.vue', 'assets', 'pages', 'components', 'layouts', 'middleware', 'plugins', 'composables', 'stores', 'modules',
  'server', 'shared', 'public', 'utils', 'nuxt.config.ts', 'tailwind.config.ts', 'tsconfig.json', 'package.json', 'package-lock.json',
]

function filesUnder(path) {
  const found = statSync(path, { throwIfNoEntry: false })
  if (!found) return []
  if (!found.isDirectory()) return [path]
  return readdirSync(path).sort().flatMap(name => filesUnder(join(path, name)))
}

/**
 * One hash over names and contents of all sources and the Node version.
 * @param {string} root
 */
export function fingerprintSources(root, sources = buildSources) {
  const hash = createHash('sha256').update(process.version)
  for (const file of sources.flatMap(source => filesUnder(join(root, source)))) {
    const content = readFileSync(file)
    hash.update(`\0${relative(root, file)}\0${content.length}\0`).update(content)
  }
  return hash.digest('hex')
}

const stampFile = outputDir => join(outputDir, 'build-stamp.txt')

/** @param {string} outputDir @param {string} fingerprint */
export function isBuildStale(outputDir, fingerprint) {
  if (!existsSync(join(outputDir, 'server/index.mjs')) || !existsSync(stampFile(outputDir))) return true
  return readFileSync(stampFile(outputDir), 'utf8') !== fingerprint
}

/**
 * Builds where sources changed since the last build. The stamp lies in the output, which a build empties first.
 * @param {object} options
 * @param {string} options.root
 * @param {string} options.outputDir
 * @param {string} options.buildDir Nuxt's working folder
 * @param {ReturnType<typeof import('./keeper.mjs').createKeeper>} options.keeper
 * @param {(line: string) => void} options.say
 * @returns {Promise<string>} the server's entry file
 */
export async function buildIfStale({ root, outputDir, buildDir, keeper, say }) {
  return withLock(`${outputDir}.lock`, async () => {
    const fingerprint = fingerprintSources(root)
    if (isBuildStale(outputDir, fingerprint)) {
      say('Building the program, about half a minute …')
      await runBuild({ root, outputDir, buildDir, keeper })
      writeFileSync(stampFile(outputDir), fingerprint)
    }
    return join(outputDir, 'server/index.mjs')
  })
}

async function runBuild({ root, outputDir, buildDir, keeper }) {
  // Beside the working folder, which the build empties.
  const logFile = `${buildDir}.log`
  mkdirSync(dirname(logFile), { recursive: true })
  const log = openSync(logFile, 'w')
  const code = await keeper.run(process.execPath, [join(root, 'node_modules/nuxt/bin/nuxt.mjs'), 'build'], {
    cwd: root, stdio: ['ignore', log, log],
    env: { ...process.env, NODE_ENV: 'production', LATHKEY_OUTPUT_DIR: outputDir, LATHKEY_BUILD_DIR: buildDir },
  }).finally(() => closeSync(log))
  if (code === 0) return
  throw new Refusal(`The build failed (code ${code}). The end of ${logFile}:\n${readFileSync(logFile, 'utf8').trimEnd().split('\n').slice(-30).join('\n')}`)
}
