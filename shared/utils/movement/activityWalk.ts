import { isActive, type ActivityLimits } from './activity'
import { kendallCounts, testCounts } from './mannKendall'
import { seasonFits } from './seasonFit'
import { DAYS_PER_YEAR, yearsOf, type SeriesPoint } from './series'
import { selectMedian } from './selectRank'

/** Pairwise slopes a year, those of the first k points always in front. */
function slopesInOrder(points: readonly SeriesPoint[]): Float64Array {
  const years = yearsOf(points)
  const slopes = new Float64Array(points.length * (points.length - 1) / 2)
  let at = 0
  for (let j = 1; j < points.length; j++) {
    for (let i = 0; i < j; i++) slopes[at++] = (points[j]!.value - points[i]!.value) / (years[j]! - years[i]!)
  }
  return slopes
}

/** Root mean square of the uncertainties of the first 0, 1, 2 … points. */
function sigmasInOrder(points: readonly SeriesPoint[]): number[] {
  const sigmas = [0]
  let squares = 0
  points.forEach((point, i) => {
    squares += point.sigma ** 2
    sigmas.push(Math.sqrt(squares / (i + 1)))
  })
  return sigmas
}

/**
 * Whether the first `count` points were active, for every count of one series: each look answers what the full trend of
 * those points would. Median slopes are only found where counting the slopes above the limit does not already decide.
 */
export function activityWalk(points: readonly SeriesPoint[], limits: ActivityLimits): (count: number) => boolean {
  const tests = kendallCounts(points.map(point => point.value))
  const sigmas = sigmasInOrder(points)
  let slopes: Float64Array | undefined
  let fits: ReturnType<typeof seasonFits> | undefined
  return (count) => {
    const test = testCounts(tests[count - 1]!)
    if (!test) return false
    const spanDays = points[count - 1]!.day - points[0]!.day
    const rise = (limit: number, orEqual: boolean) => medianRiseReaches((slopes ??= slopesInOrder(points)).subarray(0, count * (count - 1) / 2), spanDays, limit, orEqual)
    return isActive({
      sigma: sigmas[count]!, pRising: test.pRising,
      riseIsAtLeast: least => rise(least, true),
      riseIsAbove: limit => rise(limit, false),
      season: () => (fits ??= seasonFits(points))(count),
    }, limits)
  }
}

/** Whether median slope times span is above a limit, or at it too. */
function medianRiseReaches(slopes: Float64Array, spanDays: number, limit: number, orEqual: boolean): boolean {
  const daysPerYear = DAYS_PER_YEAR
  let reaching = 0
  for (let i = 0; i < slopes.length; i++) {
    const rise = slopes[i]! * spanDays / daysPerYear
    if (rise > limit || (orEqual && rise === limit)) reaching++
  }
  const half = slopes.length / 2
  if (reaching !== half) return reaching > half
  const rise = selectMedian(slopes.slice(), slopes.length) * spanDays / daysPerYear
  return rise > limit || (orEqual && rise === limit)
}
