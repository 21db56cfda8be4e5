import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { countVitest, noTests, oneCheck } from './counts.mjs'
import { testBuildFolders } from './testFolder.mjs'

/**
 * @typedef {object} StepContext
 * @property {string} root
 * @property {string} folder of this run
 * @property {ReturnType<typeof import('./keeper.mjs').createKeeper>} keeper
 * @property {Record<string, string>} services the environment of the test services
 */

/** @param {StepContext} context */
function runNode({ root, keeper, services }, file, parameters, env = {}) {
  return keeper.run(process.execPath, [join(root, file), ...parameters], {
    cwd: root, env: { ...process.env, ...services, ...env }, stdio: ['ignore', 'inherit', 'inherit'],
  })
}

/** Makes what lint and type check read; counted only where it fails. @param {StepContext} context */
export async function prepareTypes(context) {
  const code = await runNode(context, 'node_modules/nuxt/bin/nuxt.mjs', ['prepare', '--logLevel', 'silent'])
  return code === 0 ? noTests : oneCheck(false)
}

/** @param {StepContext} context */
export const lint = async context => oneCheck(await runNode(context, 'node_modules/eslint/bin/eslint.js', ['.', '--max-warnings', '0']) === 0)

/** @param {StepContext} context */
export const checkTypes = async context => oneCheck(await runNode(context, 'node_modules/vue-tsc/bin/vue-tsc.js', ['-b', '--noEmit']) === 0)

/** The built output's first-load size. @param {StepContext} context */
export async function checkSize(context) {
  const { outputDir } = testBuildFolders(context.root)
  return oneCheck(await runNode(context, 'scripts/size.mjs', [outputDir], { LATHKEY_OUTPUT_DIR: outputDir }) === 0)
}

/**
 * One vitest project, counted test by test.
 * @param {'unit' | 'api' | 'browser'} project
 * @returns {(context: StepContext) => Promise<import('./counts.mjs').Counts>}
 */
export function runProject(project) {
  return async (context) => {
    const report = join(context.folder, `${project}.json`)
    const code = await runNode(context, 'node_modules/vitest/vitest.mjs', [
      'run', '--project', project, '--reporter=default', '--reporter=json', `--outputFile.json=${report}`,
    ])
    return countVitest(existsSync(report) ? JSON.parse(readFileSync(report, 'utf8')) : undefined, code)
  }
}
