import type { MarkKind, ReadingMethod } from '../../types/mark'

/**
 * Standard uncertainty of one reading, in the unit of the mark's kind. All ours; crack widths as in the design,
 * string-line, count and stain sizes set with the same care: a stain's edge is soft, a pop may be missed or counted twice.
 * A method that does not suit the kind has no value.
 */
const SIGMAS: Record<MarkKind, Partial<Record<ReadingMethod, number>>> = {
  'crack': {
    'guess': 1.0, 'coin-or-card': 0.5, 'ruler': 0.4, 'photo-with-scale': 0.3, 'gauge-card': 0.2, 'tell-tale': 0.2, 'calipers': 0.1,
  },
  'nail-pops': { count: 0.5 },
  'sag': { 'guess': 5, 'ruler': 2, 'string-line': 1 },
  'stain': { 'guess': 50, 'ruler': 10, 'photo-with-scale': 10 },
}

/** Throws RangeError for a method that cannot measure this kind of mark. */
export function readingSigma(kind: MarkKind, method: ReadingMethod): number {
  const sigma = SIGMAS[kind][method]
  if (sigma === undefined) throw new RangeError(`A ${kind} is not measured by ${method}`)
  return sigma
}

/** Own uncertainty from double readings: standard deviation of the differences over √2. No answer (null) below 5 pairs (ours). */
export function sigmaFromDoubleReadings(pairs: readonly (readonly [number, number])[]): number | null {
  if (pairs.length < 5) return null
  const differences = pairs.map(([first, second]) => first - second)
  if (!differences.every(Number.isFinite)) throw new RangeError('Double readings must be numbers')
  const mean = differences.reduce((sum, value) => sum + value, 0) / differences.length
  const variance = differences.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (differences.length - 1)
  return Math.sqrt(variance / 2)
}

/** Ours: repeating a reading does not show what is the same wrong in both, so nobody counts as more than twice as sure as the method. */
const LEAST_SHARE_OF_METHOD = 0.5

/** What one person's readings by this method are worth: their own, where enough double readings show it, else the method's. */
export function personSigma(kind: MarkKind, method: ReadingMethod, pairs: readonly (readonly [number, number])[]): number {
  const usual = readingSigma(kind, method)
  const own = sigmaFromDoubleReadings(pairs)
  return own === null ? usual : Math.max(own, usual * LEAST_SHARE_OF_METHOD)
}
