import { addDays, dayFromNumber } from '../days'
import type { Activity } from '../../types/mark'
import { OUR_LIMITS } from '../../types/limits'
import { isActive, restOf } from './activity'
import { activityWalk } from './activityWalk'
import { detectableRate, type DetectableRate } from './detectableRate'
import { mannKendall, type MannKendall } from './mannKendall'
import { nextBestReadingOn } from './nextBestReading'
import { Z_975 } from './normal'
import { SEASON_LEAST_READINGS, seasonFit, type SeasonFit } from './seasonFit'
import { sameMonthsTest, type SeasonalKendall } from './seasonalKendall'
import { DAYS_PER_YEAR, seriesOf, seriesSigma, spanDaysOf, timeSumOfSquares, TWELVE_MONTHS_DAYS, yearsOf, type SeriesPoint, type TrendReading } from './series'
import { suddenRises, type SuddenRise } from './sudden'
import { medianOf, theilSen } from './theilSen'

/** In the unit of the readings; the defaults are for crack widths and sags in mm. */
export interface TrendOptions {
  seasonAllowance?: number
  dormantWithinPerYear?: number
  leastJump?: number
  jumpSigmas?: number
  leastReadings?: number
  leastDays?: number
  pRising?: number
}

interface TrendBasis {
  readingCount: number
  spanDays: number
  sigma: number | null
  mannKendall: MannKendall | null
  /** Set when the newest reading jumped. */
  sudden: SuddenRise | null
  suddenRises: SuddenRise[]
  detectable: DetectableRate | null
  nextBestOn: string | null
}

export interface TooFewReadings extends TrendBasis {
  kind: 'too few readings'
  activity: Extract<Activity, 'too-few-readings'>
  /** How many readings a verdict asks for, and how many are missing. */
  needed: number
  missing: number
  /** The first day the readings can span long enough; null without any reading. */
  enoughOn: string | null
}

export interface MeasuredTrend extends TrendBasis {
  kind: 'measured'
  activity: Exclude<Activity, 'too-few-readings'>
  sigma: number
  mannKendall: MannKendall
  slopePerYear: number
  interval: [number, number]
  /** Value of the trend line on the first day. */
  levelAtStart: number
  startOn: string
  endOn: string
  rise: number
  /** Null below 12 months or 8 readings: not yet separable from the season. */
  season: SeasonFit | null
  /** The first day the season can be ruled out with readings going on as planned; null once it is. */
  seasonRuledOutFrom: string | null
  /** The same months of different years against each other; null below two years. Shown beside, no part of the rule. */
  sameMonths: SeasonalKendall | null
  /** The first day on which the trend was already active with the readings up to then. */
  activeSince: string | null
}

export type MarkTrend = TooFewReadings | MeasuredTrend

type Settings = Required<TrendOptions>

const MONTH_DAYS = 30

function basisOf(points: SeriesPoint[], settings: Settings): TrendBasis {
  const sigma = points.length === 0 ? null : seriesSigma(points)
  const rises = suddenRises(points, settings.leastJump, settings.jumpSigmas)
  const lastOn = points.length === 0 ? null : dayFromNumber(points.at(-1)!.day)
  return {
    readingCount: points.length,
    spanDays: spanDaysOf(points),
    sigma,
    mannKendall: mannKendall(points.map(point => point.value)),
    sudden: rises.find(rise => rise.takenOn === lastOn) ?? null,
    suddenRises: rises,
    detectable: sigma === null ? null : detectableRate(points, sigma, settings.seasonAllowance),
    nextBestOn: sigma === null ? null : nextBestReadingOn(points, sigma, settings),
  }
}

function enough(points: SeriesPoint[], { leastReadings, leastDays }: Settings): boolean {
  return points.length >= leastReadings && spanDaysOf(points) >= leastDays
}

function judge(points: SeriesPoint[], settings: Settings) {
  const years = yearsOf(points)
  const values = points.map(point => point.value)
  const sigma = seriesSigma(points)
  const test = mannKendall(values)!
  const slope = theilSen(years, values, test.varS, Z_975 * sigma / Math.sqrt(timeSumOfSquares(years)))!
  const spanDays = spanDaysOf(points)
  const rise = slope.slopePerYear * spanDays / DAYS_PER_YEAR
  const season = seasonFit(points)
  const active = isActive({ sigma, pRising: test.pRising, riseIsAtLeast: least => rise >= least, riseIsAbove: limit => rise > limit, season: () => season }, settings)
  const activity = active ? 'active' as const : restOf(slope, spanDays, settings.dormantWithinPerYear)
  const levelAtStart = medianOf(values.map((value, i) => value - slope.slopePerYear * years[i]!))
  return { activity, sigma, mannKendall: test, ...slope, levelAtStart, rise, season }
}

function activityAt(points: SeriesPoint[], settings: Settings): Activity {
  return enough(points, settings) ? judge(points, settings).activity : 'too-few-readings'
}

/** Whether the first so many points were enough and active. */
function looksBack(points: SeriesPoint[], settings: Settings): (count: number) => boolean {
  const isActiveAt = activityWalk(points, settings)
  return count => count >= settings.leastReadings && points[count - 1]!.day - points[0]!.day >= settings.leastDays && isActiveAt(count)
}

/** Walks back from the newest reading while each earlier look was active too. */
function activeSinceOf(points: SeriesPoint[], settings: Settings): string {
  const isActiveAt = looksBack(points, settings)
  let count = points.length
  while (isActiveAt(count - 1)) count--
  return dayFromNumber(points[count - 1]!.day)
}

const OURS: Settings = {
  seasonAllowance: OUR_LIMITS.seasonAllowanceMm,
  dormantWithinPerYear: OUR_LIMITS.dormantWithinMmPerYear,
  leastJump: OUR_LIMITS.leastJumpMm,
  jumpSigmas: OUR_LIMITS.jumpSigmas,
  leastReadings: OUR_LIMITS.leastReadings,
  leastDays: OUR_LIMITS.leastDays,
  pRising: OUR_LIMITS.pRising,
}

const settingsOf = (options: TrendOptions): Settings => ({ ...OURS, ...options })

/** The first day on which the readings up to then were already active; null if there is none. */
export function activeFromOn(readings: readonly TrendReading[], options: TrendOptions = {}): string | null {
  const settings = settingsOf(options)
  const points = seriesOf(readings)
  const isActiveAt = looksBack(points, settings)
  const count = points.findIndex((_, i) => isActiveAt(i + 1))
  return count === -1 ? null : dayFromNumber(points[count]!.day)
}

/** Twelve months after the first reading, and late enough for the missing ones at one a month. */
function seasonRuledOutFrom(points: SeriesPoint[]): string {
  const missing = Math.max(0, SEASON_LEAST_READINGS - points.length)
  return dayFromNumber(Math.max(points[0]!.day + TWELVE_MONTHS_DAYS, points.at(-1)!.day + missing * MONTH_DAYS))
}

/** The activity alone, as `markTrend` gives it, at a small part of the work. */
export function markActivity(readings: readonly TrendReading[], options: TrendOptions = {}): Activity {
  return activityAt(seriesOf(readings), settingsOf(options))
}

/**
 * Trend of one segment of a mark's readings (a repair starts a new segment), in the readings' unit a year of 365.25 days.
 * Sources: Gilbert 1987 and EPA QA/G-9S for slope and test; the activity rule is ours. Throws RangeError on unsound readings.
 */
export function markTrend(readings: readonly TrendReading[], options: TrendOptions = {}): MarkTrend {
  const settings = settingsOf(options)
  const points = seriesOf(readings)
  const basis = basisOf(points, settings)
  const first = points[0]
  if (!first || !enough(points, settings)) {
    return {
      ...basis,
      kind: 'too few readings',
      activity: 'too-few-readings',
      needed: settings.leastReadings,
      missing: Math.max(0, settings.leastReadings - points.length),
      enoughOn: first ? addDays(dayFromNumber(first.day), settings.leastDays) : null,
    }
  }
  const judged = judge(points, settings)
  return {
    ...basis,
    ...judged,
    kind: 'measured',
    startOn: dayFromNumber(first.day),
    endOn: dayFromNumber(points.at(-1)!.day),
    seasonRuledOutFrom: judged.season ? null : seasonRuledOutFrom(points),
    sameMonths: sameMonthsTest(points),
    activeSince: judged.activity === 'active' ? activeSinceOf(points, settings) : null,
  }
}
