import { Z_975 } from './normal'

export interface TheilSen {
  slopePerYear: number
  /** Gilbert's 95 % interval. */
  interval: [number, number]
}

function medianOfSorted(sorted: ArrayLike<number>): number {
  const middle = sorted.length / 2
  return sorted.length % 2 === 1 ? sorted[Math.floor(middle)]! : (sorted[middle - 1]! + sorted[middle]!) / 2
}

export function medianOf(values: readonly number[]): number {
  return medianOfSorted(new Float64Array(values).sort())
}

/** Value at a rank counted from 1, between ranks by a straight line, held to the ends. */
function atRank(sorted: ArrayLike<number>, rank: number): number {
  const held = Math.min(sorted.length, Math.max(1, rank))
  const below = sorted[Math.floor(held) - 1]!
  const above = sorted[Math.ceil(held) - 1]!
  return below + (held - Math.floor(held)) * (above - below)
}

/**
 * Median of the pairwise slopes, per year, with Gilbert's interval: C = 1.96·√Var(S), ranks (N−C)/2 and (N+C)/2+1
 * of the N sorted slopes (Gilbert 1987 §16.5; EPA Unified Guidance 2009 §17.3.3).
 * `least` is the narrowest half-width the interval may have. No answer (null) without two different times.
 */
export function theilSen(years: readonly number[], values: readonly number[], varS: number, least = 0): TheilSen | null {
  const slopes = new Float64Array(years.length * (years.length - 1) / 2)
  let count = 0
  for (let i = 0; i < years.length; i++) {
    for (let j = i + 1; j < years.length; j++) {
      const gap = years[j]! - years[i]!
      if (gap !== 0) slopes[count++] = (values[j]! - values[i]!) / gap
    }
  }
  if (count === 0) return null
  // Typed arrays sort numbers natively.
  const sorted = slopes.subarray(0, count).sort()
  const slopePerYear = medianOfSorted(sorted)
  const c = Z_975 * Math.sqrt(varS)
  const low = atRank(sorted, (sorted.length - c) / 2)
  const high = atRank(sorted, (sorted.length + c) / 2 + 1)
  return { slopePerYear, interval: [Math.min(low, slopePerYear - least), Math.max(high, slopePerYear + least)] }
}
