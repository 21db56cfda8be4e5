import { execFile } from 'node:child_process'
import { join } from 'node:path'
import { promisify } from 'node:util'
import { migrate } from './bringUp.mjs'
import { startCluster } from './cluster.mjs'

/**
 * @typedef {{ name: string, marks: number, attics: number, seconds: number, mostSeconds: number, marksPerSecond: number, processorSeconds: number, firstThirdMb: number, lastThirdMb: number }} Night
 * @typedef {{ nights: Night[], pureMarksPerSecond: number }} Reviewed
 */

/**
 * The daily review of a large invented portfolio in a private database of its own.
 * @param {{ root: string, folder: string, keeper: ReturnType<typeof import('./keeper.mjs').createKeeper>, say: (line: string) => void }} options
 * @returns {Promise<Reviewed>}
 */
export async function measureReview({ root, folder, keeper, say }) {
  const cluster = await startCluster({ folder: join(folder, 'review'), isForTests: true, keeper, say })
  await migrate({ root, keeper, env: { ...process.env, DATABASE_OWNER_URL: cluster.ownerUrl } })
  say('Reviewing a large portfolio on two nights …')
  const { stdout } = await promisify(execFile)(process.execPath, ['--import', 'tsx', join(root, 'bench/review.ts')], {
    cwd: root, env: { ...process.env, DATABASE_URL: cluster.appUrl, DATABASE_OWNER_URL: cluster.ownerUrl },
  })
  return JSON.parse(stdout)
}

/** @param {Night} night */
export const isReviewQuickEnough = ({ seconds, mostSeconds }) => seconds < mostSeconds

/** @param {Reviewed} reviewed @returns {string} a Markdown table */
export function reviewTableOf({ nights, pureMarksPerSecond }) {
  const lineOf = night => `| ${[
    night.name, night.marks, night.attics, night.seconds.toFixed(1), night.processorSeconds.toFixed(1), Math.round(night.marksPerSecond), Math.round(pureMarksPerSecond),
    (night.marksPerSecond / pureMarksPerSecond).toFixed(2), `${Math.round(night.firstThirdMb)} / ${Math.round(night.lastThirdMb)}`,
    `< ${night.mostSeconds} s`, isReviewQuickEnough(night) ? 'met' : '**missed**',
  ].join(' | ')} |`
  return [
    '| daily review | marks | attics | s | processor s | marks/s | marks/s judged in memory | ratio | memory MB, first / last third | target | |',
    '|---|---:|---:|---:|---:|---:|---:|---:|---:|---|---|',
    ...nights.map(lineOf),
  ].join('\n')
}
