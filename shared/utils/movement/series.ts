import { dayNumber } from '../days'

/** One dated value with its standard uncertainty, in the unit of the mark's kind. */
export interface TrendReading { takenOn: string, value: number, sigma: number }

export interface SeriesPoint { day: number, value: number, sigma: number }

/** Julian year: the unit of every rate. */
export const DAYS_PER_YEAR = 365.25

/** A full year of readings, in days. */
export const TWELVE_MONTHS_DAYS = 365

/**
 * Readings in order of time, same-day ones averaged (uncertainties as of independent readings).
 * Throws RangeError for a value that is not a finite number, an unsound day, or an uncertainty not above zero.
 */
export function seriesOf(readings: readonly TrendReading[]): SeriesPoint[] {
  const byDay = new Map<number, TrendReading[]>()
  for (const reading of readings) {
    if (!Number.isFinite(reading.value)) throw new RangeError(`Reading value is not a number: ${reading.value}`)
    if (!(Number.isFinite(reading.sigma) && reading.sigma > 0)) throw new RangeError(`Reading sigma must be above zero: ${reading.sigma}`)
    const day = dayNumber(reading.takenOn)
    const same = byDay.get(day)
    if (same) same.push(reading)
    else byDay.set(day, [reading])
  }
  return [...byDay].sort(([a], [b]) => a - b).map(([day, same]) => pointOf(day, same))
}

function pointOf(day: number, same: readonly TrendReading[]): SeriesPoint {
  const [first] = same
  if (same.length === 1) return { day, value: first!.value, sigma: first!.sigma }
  return {
    day,
    value: same.reduce((sum, reading) => sum + reading.value, 0) / same.length,
    sigma: Math.sqrt(same.reduce((sum, reading) => sum + reading.sigma ** 2, 0)) / same.length,
  }
}

/** Root mean square of the points' uncertainties: the σ of the series. */
export function seriesSigma(points: readonly SeriesPoint[]): number {
  return Math.sqrt(points.reduce((sum, point) => sum + point.sigma ** 2, 0) / points.length)
}

export function spanDaysOf(points: readonly SeriesPoint[]): number {
  return points.length === 0 ? 0 : points.at(-1)!.day - points[0]!.day
}

export function yearsOf(points: readonly SeriesPoint[]): number[] {
  const start = points[0]?.day ?? 0
  return points.map(point => (point.day - start) / DAYS_PER_YEAR)
}

/** Sum of squares of the times about their mean, in years². */
export function timeSumOfSquares(years: readonly number[]): number {
  const mean = years.reduce((sum, year) => sum + year, 0) / years.length
  return years.reduce((sum, year) => sum + (year - mean) ** 2, 0)
}
