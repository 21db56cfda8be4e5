import { leastSquares } from './leastSquares'
import { Z_80, Z_99 } from './normal'
import { seasonColumns, SEASON_LEAST_READINGS } from './seasonFit'
import { DAYS_PER_YEAR, timeSumOfSquares, TWELVE_MONTHS_DAYS, spanDaysOf, yearsOf, type SeriesPoint } from './series'

export interface DetectableRate {
  perYear: number
  /** What holds it up: the season, until a year of readings exists, or the number and sharpness of readings. */
  limitedBy: 'season' | 'readings'
}

/**
 * Steady rate these dates and this uncertainty would show with a chance of 80 %, at the one-sided 1 % the activity rule asks for.
 * Before a year of readings the rate must also outgrow the season allowance. No answer (null) without two different days.
 */
export function detectableRate(points: readonly SeriesPoint[], sigma: number, seasonAllowance: number): DetectableRate | null {
  const years = yearsOf(points)
  const spanDays = spanDaysOf(points)
  if (spanDays === 0) return null
  if (spanDays >= TWELVE_MONTHS_DAYS && points.length >= SEASON_LEAST_READINGS) {
    const fit = leastSquares(seasonColumns(years), years)
    if (fit) return { perYear: (Z_99 + Z_80) * sigma * Math.sqrt(fit.unitVariances[1]!), limitedBy: 'readings' }
  }
  const standardError = sigma / Math.sqrt(timeSumOfSquares(years))
  const byReadings = (Z_99 + Z_80) * standardError
  const bySeason = (seasonAllowance + 2 * sigma) / (spanDays / DAYS_PER_YEAR) + Z_80 * standardError
  return bySeason > byReadings ? { perYear: bySeason, limitedBy: 'season' } : { perYear: byReadings, limitedBy: 'readings' }
}
