import { dayFromNumber } from '../days'
import { unitVariances } from './leastSquares'
import { seasonColumns } from './seasonFit'
import { DAYS_PER_YEAR, yearsOf, type SeriesPoint } from './series'

/** Ours: a reading is worth planning between a week and a quarter after the last one. */
const SOONEST_DAYS = 7
const LATEST_DAYS = 91
const STEP_DAYS = 7
/** Ours: an earlier day is taken when it gives this share of what the best day would give. */
const GOOD_ENOUGH_SHARE = 0.9

/**
 * The rows of the season model at these times. The season's size is taken as known to about half its allowance (two extra
 * rows), so that there is an answer before a full year exists.
 */
function knownRows(years: readonly number[], sigma: number, seasonAllowance: number): number[][] {
  const prior = sigma / Math.max(seasonAllowance / 2, sigma)
  return seasonColumns(years).map((column, i) => [...column, i === 2 ? prior : 0, i === 3 ? prior : 0])
}

const slopeVariance = (columns: readonly number[][]) => unitVariances(columns)?.[1] ?? Infinity

export interface WantedReadings { seasonAllowance: number, leastReadings: number, leastDays: number }

/** Day the next reading tells most about the rate: the earliest nearly as good as the best within a quarter. */
export function nextBestReadingOn(points: readonly SeriesPoint[], sigma: number, { seasonAllowance, leastReadings, leastDays }: WantedReadings): string | null {
  const last = points.at(-1)
  if (!last) return null
  const first = points[0]!
  const missing = leastReadings - points.length
  if (missing > 0) {
    const daysLeft = Math.max(0, first.day + leastDays - last.day)
    return dayFromNumber(last.day + Math.max(SOONEST_DAYS, Math.ceil(daysLeft / missing)))
  }
  const years = yearsOf(points)
  const lastYear = years.at(-1)!
  const known = knownRows(years, sigma, seasonAllowance)
  const now = slopeVariance(known)
  const options = Array.from({ length: Math.floor((LATEST_DAYS - SOONEST_DAYS) / STEP_DAYS) + 1 }, (_, i) => SOONEST_DAYS + i * STEP_DAYS)
  const added = seasonColumns(options.map(days => lastYear + days / DAYS_PER_YEAR))
  const gains = options.map((days, option) => {
    const after = slopeVariance(known.map((column, i) => [...column, added[i]![option]!]))
    return { days, gain: now === Infinity ? 1 / after : now - after }
  })
  const best = Math.max(...gains.map(option => option.gain))
  const chosen = gains.find(option => option.gain >= GOOD_ENOUGH_SHARE * best)!
  return dayFromNumber(last.day + chosen.days)
}
