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

const term = (m: number) => m * (m - 1) * (2 * m + 5)

/** What the test is made of: it can be carried on from one reading to the next. */
export interface KendallCount { n: number, s: number, tieTerms: number, hasTies: boolean }

/** The count of the first value, of the first two, and so on. */
export function kendallCounts(values: ArrayLike<number>): KendallCount[] {
  const sizes = new Map<number, number>()
  const counts: KendallCount[] = []
  let s = 0
  let tieTerms = 0
  for (let j = 0; j < values.length; j++) {
    const value = values[j]!
    for (let i = 0; i < j; i++) s += Math.sign(value - values[i]!)
    const size = sizes.get(value) ?? 0
    sizes.set(value, size + 1)
    tieTerms += term(size + 1) - term(size)
    counts.push({ n: j + 1, s, tieTerms, hasTies: sizes.size < j + 1 })
  }
  return counts
}

/** Var(S) = [n(n−1)(2n+5) − Σt(t−1)(2t+5)]/18 over groups of t equal values (EPA QA/G-9S §4.3.4). */
export const varianceOfCount = ({ n, tieTerms }: KendallCount) => (term(n) - tieTerms) / 18

export function varianceOfS(values: readonly number[]): number {
  const sizes = new Map<number, number>()
  for (const value of values) sizes.set(value, (sizes.get(value) ?? 0) + 1)
  let tieTerms = 0
  for (const size of sizes.values()) tieTerms += term(size)
  return varianceOfCount({ n: values.length, s: 0, tieTerms, hasTies: false })
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

const ORDERINGS = Array.from({ length: EXACT_UP_TO + 1 }, (_, n) => orderingsByFallingPairs(n))

function exactChanceAtLeast(s: number, n: number): number {
  const counts = ORDERINGS[n]!
  const pairs = (n * (n - 1)) / 2
  let atLeast = 0
  let total = 0
  counts.forEach((count, falling) => {
    total += count
    if (pairs - 2 * falling >= s) atLeast += count
  })
  return atLeast / total
}

/** The test from its counts; null below 4 values. */
export function testCounts(count: KendallCount): MannKendall | null {
  const { n, s, hasTies } = count
  if (n < MANN_KENDALL_LEAST) return null
  const varS = varianceOfCount(count)
  const z = varS === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(varS)
  if (n <= EXACT_UP_TO && !hasTies) {
    return { s, varS, z, p: Math.min(1, 2 * exactChanceAtLeast(Math.abs(s), n)), pRising: exactChanceAtLeast(s, n), exact: true }
  }
  return { s, varS, z, p: Math.min(1, 2 * normalBelow(-Math.abs(z))), pRising: normalBelow(-z), exact: false }
}

/**
 * Mann–Kendall test on values in order of time (EPA QA/G-9S; Gilbert 1987), with the ±1 continuity correction.
 * Exact for n ≤ 10 without ties. No answer (null) below 4 values.
 */
export function mannKendall(values: readonly number[]): MannKendall | null {
  const last = kendallCounts(values).at(-1)
  return last ? testCounts(last) : null
}
