import { normalBelow } from './normal'

export interface MannKendall {
  s: number
  varS: number
  z: number
  /** Two-sided. */
  p: number
  /** Chance of an S at least this high when nothing rises. */
  pRising: number
  exact: boolean
}

/** Below this many values the test has no meaning at any usual level. */
export const MANN_KENDALL_LEAST = 4

/** Exact distribution up to here when there are no ties (EPA QA/G-9S gives tables to 10). */
const EXACT_UP_TO = 10

/** Var(S) = [n(n−1)(2n+5) − Σt(t−1)(2t+5)]/18 over groups of t equal values (EPA QA/G-9S §4.3.4). */
export function varianceOfS(values: readonly number[]): number {
  const groups = new Map<number, number>()
  for (const value of values) groups.set(value, (groups.get(value) ?? 0) + 1)
  const term = (m: number) => m * (m - 1) * (2 * m + 5)
  const ties = [...groups.values()].reduce((sum, size) => sum + term(size), 0)
  return (term(values.length) - ties) / 18
}

export function kendallS(values: readonly number[]): number {
  let s = 0
  for (let i = 0; i < values.length; i++) {
    for (let j = i + 1; j < values.length; j++) s += Math.sign(values[j]! - values[i]!)
  }
  return s
}

/** Number of orderings of n different values with 0, 1, 2 … falling pairs. */
function orderingsByFallingPairs(n: number): number[] {
  let counts = [1]
  for (let m = 2; m <= n; m++) {
    const next = Array.from({ length: counts.length + m - 1 }, () => 0)
    counts.forEach((count, pairs) => {
      for (let k = 0; k < m; k++) next[pairs + k]! += count
    })
    counts = next
  }
  return counts
}

function exactChanceAtLeast(s: number, n: number): number {
  const counts = orderingsByFallingPairs(n)
  const pairs = (n * (n - 1)) / 2
  const total = counts.reduce((sum, count) => sum + count, 0)
  return counts.reduce((sum, count, falling) => (pairs - 2 * falling >= s ? sum + count : sum), 0) / total
}

/**
 * Mann–Kendall test on values in order of time (EPA QA/G-9S; Gilbert 1987), with the ±1 continuity correction.
 * Exact for n ≤ 10 without ties. No answer (null) below 4 values.
 */
export function mannKendall(values: readonly number[]): MannKendall | null {
  const n = values.length
  if (n < MANN_KENDALL_LEAST) return null
  const s = kendallS(values)
  const varS = varianceOfS(values)
  const z = varS === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(varS)
  const exact = n <= EXACT_UP_TO && new Set(values).size === n
  if (exact) {
    const p = Math.min(1, 2 * exactChanceAtLeast(Math.abs(s), n))
    return { s, varS, z, p, pRising: exactChanceAtLeast(s, n), exact }
  }
  return { s, varS, z, p: Math.min(1, 2 * normalBelow(-Math.abs(z))), pRising: normalBelow(-z), exact }
}
