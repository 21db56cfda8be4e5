import autocannon from 'autocannon'
import { processorMs, waitUntilQuiet } from './benchProcess.mjs'

/**
 * @typedef {{ url: string, headers?: Record<string, string>, pid?: number }} Target pid: of the server
 * @typedef {{ times: number[], refused: number, seconds: number, processorMs: number }} Load
 *   response times in ms, answers other than 200, time under load, the server's processor time
 */

/** @returns {Load} */
export const noLoad = () => ({ times: [], refused: 0, seconds: 0, processorMs: 0 })

/**
 * Keeps the connections busy for some seconds and adds what it saw to `load`; answers once the server is at rest again.
 * @param {Target} target
 * @param {{ connections: number, seconds: number, load: Load }} options
 */
export async function pressOn({ url, headers, pid }, { connections, seconds, load }) {
  const before = processorMs(pid)
  const running = autocannon({ url, headers, connections, duration: seconds, timeout: 20 })
  running.on('response', (_client, statusCode, _bytes, ms) => {
    if (statusCode === 200) load.times.push(ms)
    else load.refused += 1
  })
  const result = await running
  load.seconds += (result.finish - result.start) / 1000
  load.refused += result.errors
  load.processorMs += (processorMs(pid) ?? 0) - (before ?? 0)
  await waitUntilQuiet(pid)
}

/**
 * Every target in turn, over and over, so that what else the machine does meets all alike.
 * @template {Target} T
 * @param {T[]} targets
 * @param {{ connections: number, seconds: number, rounds: number, onRound?: (round: number) => void }} options seconds: for each target, over all rounds
 * @returns {Promise<Map<T, Load>>}
 */
export async function pressInTurn(targets, { connections, seconds, rounds, onRound }) {
  const loads = new Map(targets.map(target => [target, noLoad()]))
  for (const target of targets) await pressOn(target, { connections, seconds: 1, load: noLoad() })
  for (let round = 1; round <= rounds; round += 1) {
    onRound?.(round)
    for (const [target, load] of loads) await pressOn(target, { connections, seconds: seconds / rounds, load })
  }
  return loads
}

/** Nearest rank. @param {number[]} times @param {number} share */
export function percentile(times, share) {
  const sorted = Float64Array.from(times).sort()
  return sorted[Math.max(0, Math.ceil(share * sorted.length) - 1)]
}

/** @param {Load} load */
export function measuresOf({ times, refused, seconds, processorMs }) {
  if (times.length === 0) return { perSecond: 0, p50Ms: undefined, p95Ms: undefined, processorMs: undefined, refused }
  return {
    perSecond: times.length / seconds, p50Ms: percentile(times, 0.5), p95Ms: percentile(times, 0.95), refused,
    processorMs: processorMs > 0 ? processorMs / (times.length + refused) : undefined,
  }
}
