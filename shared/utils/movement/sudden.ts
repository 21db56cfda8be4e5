import { OUR_LIMITS } from '../../types/limits'
import { dayFromNumber } from '../days'
import type { SeriesPoint } from './series'
import { medianOf } from './theilSen'

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
  return points.flatMap((point, index) => {
    const before = points.slice(Math.max(0, index - BASELINE_READINGS), index)
    if (before.length === 0) return []
    const baseline = medianOf(before.map(earlier => earlier.value))
    const sigma = Math.max(point.sigma, ...before.map(earlier => earlier.sigma))
    const threshold = Math.max(leastJump, jumpSigmas * sigma)
    const rise = point.value - baseline
    return rise > threshold ? [{ takenOn: dayFromNumber(point.day), value: point.value, baseline, rise, threshold }] : []
  })
}
