import type { Activity } from '../../types/mark'
import type { MannKendall } from './mannKendall'
import type { SeasonFit } from './seasonFit'
import { TWELVE_MONTHS_DAYS } from './series'
import type { TheilSen } from './theilSen'

export interface ActivityInput {
  spanDays: number
  sigma: number
  slope: TheilSen
  mannKendall: MannKendall
  season: SeasonFit | null
  seasonAllowance: number
  dormantWithinPerYear: number
  pRising: number
  /** Slope times span, in the unit of the readings. */
  rise: number
}

/** Whether the season explains the rise: by the fit once a year of readings exists, by the allowance before. */
function outgrowsSeason(input: ActivityInput): boolean {
  if (input.season) return input.season.slopeAtLeast > 0
  return input.rise > input.seasonAllowance + 2 * input.sigma
}

/** Activity of a series that already has enough readings over enough days. */
export function activityOf(input: ActivityInput): Exclude<Activity, 'too-few-readings'> {
  const rising = input.mannKendall.pRising < input.pRising && input.rise >= 2 * input.sigma
  if (rising && outgrowsSeason(input)) return 'active'
  const [low, high] = input.slope.interval
  const quiet = low >= -input.dormantWithinPerYear && high <= input.dormantWithinPerYear
  return quiet && input.spanDays >= TWELVE_MONTHS_DAYS ? 'dormant' : 'watch'
}
