import type { MarkKind } from '../../types/mark'
import { medianOf } from './theilSen'

/** Ours: a value this many times the usual one, or this small a part of it, is more often a slip than a change. */
const TIMES = 5
const LEAST_DIFFERENCE: Record<MarkKind, number> = { 'crack': 3, 'nail-pops': 10, 'sag': 15, 'stain': 150 }
const READINGS_LOOKED_AT = 3

/**
 * '12 mm? It was 1.2.' The value to ask about, or null when there is nothing to ask. `earlier` is of the same segment, oldest first.
 * Asking never stops a reading: the person who confirms is believed.
 */
export function valueToAskAgain(kind: MarkKind, value: number, earlier: readonly number[]): number | null {
  if (earlier.length === 0) return null
  const usual = medianOf(earlier.slice(-READINGS_LOOKED_AT))
  if (Math.abs(value - usual) < LEAST_DIFFERENCE[kind]) return null
  return value >= usual * TIMES || value * TIMES <= usual ? usual : null
}
