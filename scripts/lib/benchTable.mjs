/** Asked of each kind of answer on 2 cores with 20 connections; ours. */
export const targets = {
  json: { leastRatio: 0.4, mostP95Ms: 50, words: 'p95 < 50 ms, ≥ 0.40 × bare route' },
  page: { leastRatio: 0.5, mostP95Ms: Infinity, words: '≥ 0.50 × minimal page' },
}

/**
 * @typedef {{ perSecond: number, p50Ms?: number, p95Ms?: number, processorMs?: number, refused: number }} Measures
 * @typedef {{ name: string, kind: 'json' | 'page' | 'anew' | 'reference', measures: Measures, ratio?: number }} Row
 */

/**
 * Whether a row meets its target; a reference has none, nor has an answer made anew.
 * @param {Row} row
 */
export function meetsTarget({ kind, measures, ratio }) {
  if (!(kind in targets)) return undefined
  const { leastRatio, mostP95Ms } = targets[kind]
  return measures.refused === 0 && ratio !== undefined && ratio >= leastRatio && measures.p95Ms !== undefined && measures.p95Ms < mostP95Ms
}

const ms = value => value === undefined ? '—' : value.toFixed(value < 10 ? 2 : 1)

function lineOf(row) {
  const { name, kind, measures, ratio } = row
  const isMet = meetsTarget(row)
  const verdict = isMet === undefined ? '' : isMet ? 'met' : measures.refused > 0 ? `**missed** (${measures.refused} refused)` : '**missed**'
  return `| ${[name, Math.round(measures.perSecond), ms(measures.p50Ms), ms(measures.p95Ms), ms(measures.processorMs), ratio?.toFixed(2) ?? '', targets[kind]?.words ?? (kind === 'anew' ? '' : kind), verdict].join(' | ')} |`
}

/** @param {Row[]} rows @returns {string} a Markdown table */
export function tableOf(rows) {
  return [
    '| route | requests/s | p50 ms | p95 ms | processor ms | ratio | target | |',
    '|---|---:|---:|---:|---:|---:|---|---|',
    ...rows.map(lineOf),
  ].join('\n')
}

/**
 * @typedef {{ name: string, p50Ms: number, p95Ms: number, mostP50Ms?: number, plainP50Ms?: number }} Timing
 * `plainP50Ms`: the same answer summed station by station, in the same run.
 */

/** @param {Timing} timing whether a calculation alone meets its bound; without one there is nothing to miss */
export const isQuickEnough = ({ p50Ms, mostP50Ms }) => mostP50Ms === undefined || p50Ms < mostP50Ms

/** @param {Timing[]} timings */
export function domainTableOf(timings) {
  const lineOfTiming = (timing) => {
    const { name, p50Ms, p95Ms, mostP50Ms, plainP50Ms } = timing
    const against = plainP50Ms === undefined ? ['', ''] : [plainP50Ms.toFixed(3), (plainP50Ms / p50Ms).toFixed(1)]
    const bound = mostP50Ms === undefined ? ['', ''] : [`p50 < ${mostP50Ms} ms`, isQuickEnough(timing) ? 'met' : '**missed**']
    return `| ${[name, p50Ms.toFixed(3), p95Ms.toFixed(3), ...against, ...bound].join(' | ')} |`
  }
  return [
    '| calculation alone | p50 ms | p95 ms | station by station, p50 ms | times as fast | target | |',
    '|---|---:|---:|---:|---:|---|---|',
    ...timings.map(lineOfTiming),
  ].join('\n')
}
