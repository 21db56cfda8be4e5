import { OUR_LIMITS } from '../../types/limits'
import { dayFromNumber } from '../days'
import type { SeriesPoint } from './series'

export interface SuddenRise {
  takenOn: string
  value: number
  /** Median of the up to three readings before. */
  baseline: number
  rise: number
  threshold: number
}

const BASELINE_READINGS = 3

/**
 * Every reading more than max(leastJump, jumpSigmas·σ) above the median of the up to three before it.
 * σ is the greater of the reading's own and the coarsest of the ones before, so that a guess followed by calipers raises no alarm.
 */
export function suddenRises(points: readonly SeriesPoint[], leastJump = OUR_LIMITS.leastJumpMm, jumpSigmas = OUR_LIMITS.jumpSigmas): SuddenRise[] {
  const rises: SuddenRise[] = []
  for (let index = 1; index < points.length; index++) {
    const point = points[index]!
    const before = points.slice(Math.max(0, index - BASELINE_READINGS), index)
    const baseline = medianOfThree(before)
    const sigma = before.reduce((most, earlier) => Math.max(most, earlier.sigma), point.sigma)
    const threshold = Math.max(leastJump, jumpSigmas * sigma)
    const rise = point.value - baseline
    if (rise > threshold) rises.push({ takenOn: dayFromNumber(point.day), value: point.value, baseline, rise, threshold })
  }
  return rises
}

/** Of one to three points. */
function medianOfThree([first, second = first, third]: SeriesPoint[]): number {
  const a = first!.value
  const b = second!.value
  if (third === undefined) return (a + b) / 2
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), third.value))
}
