import { leastSquares, type LeastSquaresFit } from './leastSquares'
import { Z_975 } from './normal'
import { DAYS_PER_YEAR, seriesSigma, TWELVE_MONTHS_DAYS, yearsOf, type SeriesPoint } from './series'
import { tQuantile975 } from './tQuantile'

export interface SeasonFit {
  slopePerYear: number
  standardError: number
  /** One-sided 97.5 % lower bound of the slope. */
  slopeAtLeast: number
  /** From the yearly low to the yearly high of the fitted season. */
  peakToPeak: number
  /** Day of the year, 0 to 365.25 from 1 January, when the season part is highest. */
  highestOnDayOfYear: number
  residualSd: number
  /** Whether the season stands out from the scatter; otherwise its highest day means nothing. */
  isClear: boolean
}

/** Ours: a season counts when its swing to each side is more than so many of its standard errors. */
const CLEAR_ERRORS = 2

export const SEASON_LEAST_READINGS = 8

/** Days from 1 January 1970 into its calendar year, close enough for a phase: leap days shift it by at most one. */
function dayOfYear(day: number): number {
  return ((day % DAYS_PER_YEAR) + DAYS_PER_YEAR) % DAYS_PER_YEAR
}

/** Columns of the model: level, slope, yearly sine and cosine. */
export function seasonColumns(years: readonly number[]): number[][] {
  const turn = (year: number) => 2 * Math.PI * year
  return [years.map(() => 1), [...years], years.map(year => Math.sin(turn(year))), years.map(year => Math.cos(turn(year)))]
}

/**
 * Slope with a yearly sine and cosine. The standard error is the greater of what the residuals and what the
 * readings' own uncertainty give, so that a lucky smooth series does not look surer than its method allows.
 * No answer (null) below 12 months or 8 readings, or when the dates cannot tell season from slope.
 */
export function seasonFit(points: readonly SeriesPoint[]): SeasonFit | null {
  return seasonFits(points)(points.length)
}

/** The same for the first so many points of one series; the model's columns are laid out once. */
export function seasonFits(points: readonly SeriesPoint[]): (count: number) => SeasonFit | null {
  const columns = seasonColumns(yearsOf(points)).map(column => new Float64Array(column))
  const values = new Float64Array(points.map(point => point.value))
  return (count) => {
    if (count < SEASON_LEAST_READINGS || points[count - 1]!.day - points[0]!.day < TWELVE_MONTHS_DAYS) return null
    const fit = leastSquares(columns.map(column => column.subarray(0, count)), values.subarray(0, count))
    return fit && asSeasonFit(fit, points[0]!.day, seriesSigma(points.slice(0, count)))
  }
}

function asSeasonFit(fit: LeastSquaresFit, startDay: number, sigma: number): SeasonFit {
  const [, slopePerYear = 0, sine = 0, cosine = 0] = fit.coefficients
  const unit = Math.sqrt(fit.unitVariances[1]!)
  const residualSd = Math.sqrt(fit.residualSumOfSquares / fit.degreesOfFreedom)
  const margin = Math.max(tQuantile975(fit.degreesOfFreedom) * residualSd, Z_975 * sigma) * unit
  const swing = Math.hypot(sine, cosine)
  const swingError = Math.max(residualSd, sigma) * Math.sqrt((fit.unitVariances[2]! + fit.unitVariances[3]!) / 2)
  const highestAtYears = Math.atan2(sine, cosine) / (2 * Math.PI)
  return {
    slopePerYear,
    standardError: Math.max(residualSd, sigma) * unit,
    slopeAtLeast: slopePerYear - margin,
    peakToPeak: 2 * swing,
    highestOnDayOfYear: dayOfYear(startDay + highestAtYears * DAYS_PER_YEAR),
    residualSd,
    isClear: swing > CLEAR_ERRORS * swingError,
  }
}
