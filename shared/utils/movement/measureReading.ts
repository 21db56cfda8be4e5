import { METHODS_BY_KIND, type MarkKind, type ObservationAnswers, type ReadingMethod, type WidthComparison } from '../../types/mark'
import { readingSigma } from './readingSigma'
import { comparisonReading, rangeReading } from './widthComparisons'

export interface GivenReading {
  method: ReadingMethod
  value: number | null
  /** For coins and cards: 'thicker than … thinner than …'. */
  atLeast: number | null
  atMost: number | null
}

export type ReadingRefusal = 'method-does-not-suit' | 'value-missing' | 'value-out-of-range' | 'count-not-whole' | 'range-not-here' | 'range-upside-down'

export type MeasuredReading
  = | { kind: 'measured', method: ReadingMethod, value: number, sigma: number, low: number | null, high: number | null }
    | { kind: 'refused', field: 'method' | 'value' | 'atLeast' | 'atMost', why: ReadingRefusal }

/** Ours: beyond these it is a hole, a fallen ceiling or a slip of the finger. */
export const MOST_VALUE: Record<MarkKind, number> = { 'crack': 300, 'nail-pops': 500, 'sag': 2000, 'stain': 20_000 }

/** Value and standard uncertainty of what was given, in the unit of the mark's kind; or which field is unsound and why. */
export function measureReading(kind: MarkKind, given: GivenReading): MeasuredReading {
  if (!(METHODS_BY_KIND[kind] as readonly ReadingMethod[]).includes(given.method)) return { kind: 'refused', field: 'method', why: 'method-does-not-suit' }
  if (given.atLeast !== null || given.atMost !== null) return measureRange(kind, given)
  const { value } = given
  if (value === null) return { kind: 'refused', field: 'value', why: 'value-missing' }
  if (!(value >= 0 && value <= MOST_VALUE[kind])) return { kind: 'refused', field: 'value', why: 'value-out-of-range' }
  if (kind === 'nail-pops' && !Number.isInteger(value)) return { kind: 'refused', field: 'value', why: 'count-not-whole' }
  return { kind: 'measured', method: given.method, value, sigma: readingSigma(kind, given.method), low: null, high: null }
}

function measureRange(kind: MarkKind, given: GivenReading): MeasuredReading {
  const low = given.atLeast ?? 0
  const high = given.atMost
  if (kind !== 'crack' || given.method !== 'coin-or-card') return { kind: 'refused', field: 'atLeast', why: 'range-not-here' }
  if (!(low >= 0 && low <= MOST_VALUE.crack)) return { kind: 'refused', field: 'atLeast', why: 'value-out-of-range' }
  if (high !== null && !(high > low)) return { kind: 'refused', field: 'atMost', why: 'range-upside-down' }
  if (high !== null && high > MOST_VALUE.crack) return { kind: 'refused', field: 'atMost', why: 'value-out-of-range' }
  const range = rangeReading(low, high)
  return { kind: 'measured', method: given.method, value: range.widthMm, sigma: range.sigmaMm, low, high }
}

const BY_EYE: readonly WidthComparison[] = ['finger', 'wider']

/** The first reading a report holds; null when it gives no size. A number that was measured goes before a comparison. */
export function firstReading(answers: ObservationAnswers): MeasuredReading | null {
  const method = (fallback: ReadingMethod): ReadingMethod =>
    answers.widthMethod !== null && (METHODS_BY_KIND[answers.kind] as readonly ReadingMethod[]).includes(answers.widthMethod) ? answers.widthMethod : fallback
  const given = (value: number | null, fallback: ReadingMethod) =>
    value === null ? null : measureReading(answers.kind, { method: method(fallback), value, atLeast: null, atMost: null })
  switch (answers.kind) {
    case 'crack': return given(answers.widthMm, 'guess') ?? compared(answers.widthComparison)
    case 'nail-pops': return given(answers.popCount, 'count')
    case 'sag': return given(answers.sagDropMm, 'guess')
    case 'stain': return given(answers.stainSizeMm, 'guess')
  }
}

function compared(comparison: WidthComparison | null): MeasuredReading | null {
  if (comparison === null) return null
  const range = comparisonReading(comparison)
  return {
    kind: 'measured', method: BY_EYE.includes(comparison) ? 'guess' : 'coin-or-card',
    value: range.widthMm, sigma: range.sigmaMm, low: range.atLeastMm, high: range.atMostMm,
  }
}
