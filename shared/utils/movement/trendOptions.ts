import type { MarkKind, MarkPlace, WallType } from '../../types/mark'
import { DEFAULT_SEASON_ALLOWANCE_MM, DORMANT_WITHIN_PER_YEAR, TRUSS_UPLIFT_ALLOWANCE_MM } from './activity'
import { LEAST_JUMP_MM } from './sudden'
import type { TrendOptions } from './trend'

export interface MarkSetting {
  kind: MarkKind
  place: MarkPlace | null
  wallType: WallType | null
  /** Framing of the attic above. */
  framing: string | null
}

/** Ours. A stain is read in centimetres rather than tenths of a millimetre. */
const STAIN_OPTIONS = { seasonAllowance: 30, dormantWithinPerYear: 20, leastJump: 40 }

/** What the activity rule allows this mark: the large season allowance only at interior wall corners under trusses. */
export function trendOptionsFor(setting: MarkSetting): Required<TrendOptions> {
  if (setting.kind === 'stain') return STAIN_OPTIONS
  const uplift = setting.kind === 'crack' && setting.framing === 'trusses'
    && setting.place === 'wall-ceiling-corner' && setting.wallType === 'interior'
  return {
    seasonAllowance: uplift ? TRUSS_UPLIFT_ALLOWANCE_MM : DEFAULT_SEASON_ALLOWANCE_MM,
    dormantWithinPerYear: DORMANT_WITHIN_PER_YEAR,
    leastJump: LEAST_JUMP_MM,
  }
}

/** Readings of the newest segment: a repair starts a new one, and no trend runs across it. */
export function newestSegment<R extends { segment: number }>(readings: readonly R[]): R[] {
  const newest = Math.max(...readings.map(reading => reading.segment))
  return readings.filter(reading => reading.segment === newest)
}
