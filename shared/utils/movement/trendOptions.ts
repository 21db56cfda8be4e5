import { OUR_LIMITS, type MovementLimits } from '../../types/limits'
import type { MarkKind, MarkPlace, WallType } from '../../types/mark'
import type { TrendOptions } from './trend'

export interface MarkSetting {
  kind: MarkKind
  place: MarkPlace | null
  wallType: WallType | null
  /** Framing of the attic above. */
  framing: string | null
}

/** Ours. A stain is read in centimetres rather than tenths of a millimetre, so an organisation's millimetres do not apply. */
const STAIN_OPTIONS = { seasonAllowance: 30, dormantWithinPerYear: 20, leastJump: 40 }

/** What the activity rule allows this mark under an organisation's limits: the large season allowance only at interior wall corners under trusses. */
export function trendOptionsFor(setting: MarkSetting, limits: MovementLimits = OUR_LIMITS): Required<TrendOptions> {
  const { leastReadings, leastDays, pRising, jumpSigmas } = limits
  const shared = { leastReadings, leastDays, pRising, jumpSigmas }
  if (setting.kind === 'stain') return { ...shared, ...STAIN_OPTIONS }
  const uplift = setting.kind === 'crack' && setting.framing === 'trusses'
    && setting.place === 'wall-ceiling-corner' && setting.wallType === 'interior'
  return {
    ...shared,
    seasonAllowance: uplift ? Math.max(limits.trussAllowanceMm, limits.seasonAllowanceMm) : limits.seasonAllowanceMm,
    dormantWithinPerYear: limits.dormantWithinMmPerYear,
    leastJump: limits.leastJumpMm,
  }
}

/** Readings of the newest segment: a repair starts a new one, and no trend runs across it. */
export function newestSegment<R extends { segment: number }>(readings: readonly R[]): R[] {
  const newest = Math.max(...readings.map(reading => reading.segment))
  return readings.filter(reading => reading.segment === newest)
}
