import { dayFromNumber, dayNumber } from '../days'
import { leastSquares, unitVariances } from './leastSquares'
import { Z_80, Z_975 } from './normal'
import { DAYS_PER_YEAR, seriesOf, seriesSigma, spanDaysOf, TWELVE_MONTHS_DAYS, type SeriesPoint, type TrendReading } from './series'
import { tQuantile975 } from './tQuantile'

/** All ours. */
export const TRIAL_LEAST_EACH_SIDE = 3
export const TRIAL_READING_DAYS = 14
const SEASON_LEAST_READINGS = 10
const NO_CHANGE_WITHIN_PER_YEAR = 2
const MOST_MORE_READINGS = 60

/** A difference with its 95 % interval. */
export interface Difference { value: number, interval: [number, number] }

interface TrialCounts {
  readingsBefore: number
  readingsAfter: number
  /** How many more readings the answer wants; null when no number of readings within reason would tell. */
  moreReadings: number | null
  /** When these would have been taken, one in two weeks; null with none missing. */
  tellsOn: string | null
}

/** A side has too few readings for a line of its own. */
export interface TrialWithoutAnswer extends TrialCounts { kind: 'cannot tell yet', missingBefore: number, missingAfter: number }

/** Values in the unit of the mark's readings, rates a year of 365.25 days. Correlation, never proof. */
export interface MeasuredTrial extends TrialCounts {
  kind: 'measured'
  verdict: 'slowed' | 'quickened' | 'no-change' | 'cannot-tell'
  /** Level on the day of the unloading: whether it closed or opened at once. */
  levelVerdict: 'closed' | 'opened' | 'no-step-seen'
  slopeBefore: Difference
  slopeAfter: Difference
  /** After less before. */
  slopeChange: Difference
  levelStep: Difference
  /** The change of rate these readings could show with a chance of 80 %. */
  detectablePerYear: number
  /** Fitted along once the readings reach over 12 months; before that a season can look like a change. */
  seasonFitted: boolean
  seasonRuledOutFrom: string | null
}

export type UnloadTrialResult = TrialWithoutAnswer | MeasuredTrial

const years = (day: number, at: number) => (day - at) / DAYS_PER_YEAR

/** Two straight lines with a step between them, and a common season. `bend` is the part of time the second slope is measured from. */
function columnsOf(times: number[], bend: (time: number) => number, withSeason: boolean): number[][] {
  const turn = (time: number) => 2 * Math.PI * time
  const season = withSeason ? [times.map(time => Math.sin(turn(time))), times.map(time => Math.cos(turn(time)))] : []
  return [times.map(() => 1), times.map(time => (time > 0 ? 1 : 0)), times, times.map(bend), ...season]
}

const afterwards = (time: number) => Math.max(0, time)
const beforehand = (time: number) => Math.min(0, time)

/** Spread a coefficient has for readings at these times; null while the times cannot tell the parts apart. */
function spreadOfChange(times: number[], withSeason: boolean): number | null {
  const columns = columnsOf(times, afterwards, withSeason)
  const variances = unitVariances(columns)
  return variances && Math.sqrt(variances[3]!)
}

/** How many readings more, one in two weeks, until a change of this rate would show. */
function readingsUntilShown(times: number[], sigma: number, ratePerYear: number, withSeason: boolean): number | null {
  const last = Math.max(0, times.at(-1) ?? 0)
  for (let more = 0; more <= MOST_MORE_READINGS; more++) {
    const added = Array.from({ length: more }, (_, i) => last + (i + 1) * TRIAL_READING_DAYS / DAYS_PER_YEAR)
    const spread = spreadOfChange([...times, ...added], withSeason)
    if (spread !== null && (Z_975 + Z_80) * sigma * spread <= ratePerYear) return more
  }
  return null
}

function countsOf(points: SeriesPoint[], before: number, moreReadings: number | null, day: number): TrialCounts {
  const from = Math.max(day, points.at(-1)?.day ?? day)
  return {
    readingsBefore: before, readingsAfter: points.length - before, moreReadings,
    tellsOn: moreReadings === null || moreReadings === 0 ? null : dayFromNumber(from + moreReadings * TRIAL_READING_DAYS),
  }
}

/**
 * How a mark moved before and after an unloading: least squares with its own line on each side, a step on the day, and a
 * yearly season once the readings reach over 12 months. Errors are the greater of what the residuals and the readings' own
 * uncertainty give. A reading on the day itself counts as before it. Before the unloading (null) only counts are given.
 */
export function unloadTrialResult(readings: readonly TrendReading[], unloadedOn: string | null): UnloadTrialResult {
  const points = seriesOf(readings)
  const day = unloadedOn === null ? Infinity : dayNumber(unloadedOn)
  const before = points.filter(point => point.day <= day).length
  const missingBefore = Math.max(0, TRIAL_LEAST_EACH_SIDE - before)
  const missingAfter = Math.max(0, TRIAL_LEAST_EACH_SIDE - (points.length - before))
  const fitted = missingBefore + missingAfter > 0 ? null : fitSides(points, day)
  if (!fitted) {
    // What was not read before the unloading cannot be made up for afterwards.
    const isLost = unloadedOn !== null && missingBefore > 0
    return { kind: 'cannot tell yet', missingBefore, missingAfter, ...countsOf(points, before, isLost ? null : missingBefore + missingAfter, day === Infinity ? points.at(-1)?.day ?? 0 : day) }
  }
  return { kind: 'measured', ...fitted.verdict, ...countsOf(points, before, fitted.moreReadings, day) }
}

function fitSides(points: SeriesPoint[], day: number) {
  const times = points.map(point => years(point.day, day))
  const values = points.map(point => point.value)
  const seasonFitted = points.length >= SEASON_LEAST_READINGS && spanDaysOf(points) >= TWELVE_MONTHS_DAYS
  const fromBefore = leastSquares(columnsOf(times, afterwards, seasonFitted), values)
  const fromAfter = leastSquares(columnsOf(times, beforehand, seasonFitted), values)
  if (!fromBefore || !fromAfter || fromBefore.degreesOfFreedom < 1) return null
  const residualSd = Math.sqrt(fromBefore.residualSumOfSquares / fromBefore.degreesOfFreedom)
  const sigma = seriesSigma(points)
  const margin = Math.max(tQuantile975(fromBefore.degreesOfFreedom) * residualSd, Z_975 * sigma)
  const differenceAt = (fit: typeof fromBefore, index: number): Difference => {
    const value = fit.coefficients[index]!
    const half = margin * Math.sqrt(fit.unitVariances[index]!)
    return { value, interval: [value - half, value + half] }
  }
  const levelStep = differenceAt(fromBefore, 1)
  const slopeBefore = differenceAt(fromBefore, 2)
  const slopeChange = differenceAt(fromBefore, 3)
  const slopeAfter = differenceAt(fromAfter, 2)
  const verdict = verdictOf(slopeBefore, slopeAfter, slopeChange)
  const wanted = slopeBefore.interval[0] > 0 ? slopeBefore.value : NO_CHANGE_WITHIN_PER_YEAR
  const spread = Math.max(sigma, residualSd)
  return {
    moreReadings: verdict === 'cannot-tell' ? readingsUntilShown(times, spread, wanted, seasonFitted) : 0,
    verdict: {
      verdict, levelVerdict: levelVerdictOf(levelStep), slopeBefore, slopeAfter, slopeChange, levelStep, seasonFitted,
      detectablePerYear: (Z_975 + Z_80) * spread * Math.sqrt(fromBefore.unitVariances[3]!),
      seasonRuledOutFrom: seasonFitted ? null : dayFromNumber(points[0]!.day + TWELVE_MONTHS_DAYS),
    },
  }
}

function verdictOf(before: Difference, after: Difference, change: Difference): MeasuredTrial['verdict'] {
  if (change.interval[1] < 0 && before.interval[0] > 0) return 'slowed'
  if (change.interval[0] > 0 && after.interval[0] > 0) return 'quickened'
  const within = Math.max(Math.abs(change.interval[0]), Math.abs(change.interval[1]))
  return within <= NO_CHANGE_WITHIN_PER_YEAR ? 'no-change' : 'cannot-tell'
}

function levelVerdictOf({ interval: [low, high] }: Difference): MeasuredTrial['levelVerdict'] {
  if (high < 0) return 'closed'
  return low > 0 ? 'opened' : 'no-step-seen'
}
