import { join } from 'node:path'
import { findFreePort } from './ports.mjs'
import { Refusal } from './refusal.mjs'

/** From the command to the line that says it is ready; then it is stopped. */
async function timeStart({ root, env, keeper }) {
  const startedAt = performance.now()
  const started = keeper.start(process.execPath, [join(root, 'scripts/start.mjs')], { cwd: root, env, stdio: ['ignore', 'pipe', 'inherit'], stopSignal: 'SIGINT', graceMs: 30_000 })
  let heard = ''
  for await (const chunk of started.child.stdout.setEncoding('utf8')) {
    heard += chunk
    if (heard.includes('Lathkey is ready')) break
  }
  const seconds = (performance.now() - startedAt) / 1000
  if (!heard.includes('Lathkey is ready')) throw new Refusal(`npm start did not come up:\n${heard}`)
  await started.stop()
  return seconds
}

/**
 * A first start on an empty data folder (it builds when the build is stale), and a second one on what the first left.
 * @param {{ root: string, folder: string, keeper: ReturnType<typeof import('./keeper.mjs').createKeeper> }} options
 */
export async function timeStarts({ root, folder, keeper }) {
  const env = { PATH: process.env.PATH, HOME: process.env.HOME, DATA_DIR: join(folder, 'start'), PORT: String(await findFreePort()) }
  return { firstSeconds: await timeStart({ root, env, keeper }), secondSeconds: await timeStart({ root, env, keeper }) }
}
