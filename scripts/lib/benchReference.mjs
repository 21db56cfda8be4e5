import { closeSync, mkdirSync, openSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { fingerprintSources, isBuildStale } from './build.mjs'
import { withLock } from './lock.mjs'
import { Refusal } from './refusal.mjs'

/**
 * The reference program, built once and again only when it or a dependency changes.
 * @param {{ root: string, keeper: ReturnType<typeof import('./keeper.mjs').createKeeper>, say: (line: string) => void }} options
 * @returns {Promise<string>} its entry file
 */
export async function buildReference({ root, keeper, say }) {
  const outputDir = join(root, '.test/reference/output')
  const buildDir = join(root, '.test/reference/nuxt')
  mkdirSync(buildDir, { recursive: true })
  return withLock(`${outputDir}.lock`, async () => {
    const fingerprint = fingerprintSources(root, ['bench/reference', 'package-lock.json'])
    if (isBuildStale(outputDir, fingerprint)) {
      say('Building the reference …')
      await runBuild({ root, outputDir, buildDir, keeper })
      writeFileSync(join(outputDir, 'build-stamp.txt'), fingerprint)
    }
    return join(outputDir, 'server/index.mjs')
  })
}

async function runBuild({ root, outputDir, buildDir, keeper }) {
  const logFile = `${buildDir}.log`
  const log = openSync(logFile, 'w')
  const code = await keeper.run(process.execPath, [join(root, 'node_modules/nuxt/bin/nuxt.mjs'), 'build', join(root, 'bench/reference')], {
    cwd: root, stdio: ['ignore', log, log],
    env: { ...process.env, NODE_ENV: 'production', LATHKEY_OUTPUT_DIR: outputDir, LATHKEY_BUILD_DIR: buildDir },
  }).finally(() => closeSync(log))
  if (code !== 0) throw new Refusal(`The reference could not be built (code ${code}). The end of ${logFile}:\n${readFileSync(logFile, 'utf8').split('\n').slice(-20).join('\n')}`)
}
