import type { Activity } from '../../types/mark'
import type { SeasonFit } from './seasonFit'
import { TWELVE_MONTHS_DAYS } from './series'
import type { TheilSen } from './theilSen'

/** What the rule asks of a series. The rise is slope times span, in the unit of the readings. */
export interface MovingSeries {
  sigma: number
  /** Of the Mann–Kendall test. */
  pRising: number
  riseIsAtLeast: (least: number) => boolean
  riseIsAbove: (limit: number) => boolean
  season: () => SeasonFit | null
}

export interface ActivityLimits { pRising: number, seasonAllowance: number }

/** Whether the season explains the rise: by the fit once a year of readings exists, by the allowance before. */
function outgrowsSeason(series: MovingSeries, { seasonAllowance }: ActivityLimits): boolean {
  const season = series.season()
  return season ? season.slopeAtLeast > 0 : series.riseIsAbove(seasonAllowance + 2 * series.sigma)
}

/** The activity rule, ours: a rise that luck, the readings' own error and the season do not explain. */
export function isActive(series: MovingSeries, limits: ActivityLimits): boolean {
  return series.pRising < limits.pRising && series.riseIsAtLeast(2 * series.sigma) && outgrowsSeason(series, limits)
}

/** Of a series that is not active, with enough readings over enough days. */
export function restOf(slope: TheilSen, spanDays: number, dormantWithinPerYear: number): Exclude<Activity, 'too-few-readings' | 'active'> {
  const [low, high] = slope.interval
  const quiet = low >= -dormantWithinPerYear && high <= dormantWithinPerYear
  return quiet && spanDays >= TWELVE_MONTHS_DAYS ? 'dormant' : 'watch'
}
