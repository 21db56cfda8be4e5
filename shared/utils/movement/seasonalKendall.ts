import { dayFromNumber } from '../days'
import { kendallCounts, varianceOfCount } from './mannKendall'
import { normalBelow } from './normal'
import { spanDaysOf, type SeriesPoint } from './series'

export interface SeasonalKendall {
  s: number
  varS: number
  z: number
  /** Two-sided. */
  p: number
  /** Seasons that had at least two values to compare. */
  seasons: number
}

/**
 * Mann–Kendall season by season, the sums taken together (Hirsch, Slack and Smith 1982; EPA Unified Guidance 2009 §14.3.4):
 * no season is compared with another. Values of each season in order of time. No answer (null) with fewer than two seasons.
 */
export function seasonalKendall(seasons: readonly (readonly number[])[]): SeasonalKendall | null {
  const compared = seasons.filter(values => values.length >= 2).map(values => kendallCounts(values).at(-1)!)
  if (compared.length < 2) return null
  const s = compared.reduce((sum, count) => sum + count.s, 0)
  const varS = compared.reduce((sum, count) => sum + varianceOfCount(count), 0)
  const z = varS === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(varS)
  return { s, varS, z, p: Math.min(1, 2 * normalBelow(-Math.abs(z))), seasons: compared.length }
}

const TWO_YEARS_DAYS = 730
/** Ours: with fewer months to compare the test says next to nothing. */
const LEAST_MONTHS = 6

/** Whether the same months of different years rise: readings of one month averaged, months as seasons. Null below two years of them. */
export function sameMonthsTest(points: readonly SeriesPoint[]): SeasonalKendall | null {
  if (spanDaysOf(points) < TWO_YEARS_DAYS) return null
  const months = Array.from({ length: 12 }, () => new Map<string, number[]>())
  for (const { day, value } of points) {
    const on = dayFromNumber(day)
    const years = months[Number(on.slice(5, 7)) - 1]!
    years.set(on.slice(0, 4), [...years.get(on.slice(0, 4)) ?? [], value])
  }
  const test = seasonalKendall(months.map(years => [...years.values()].map(values => values.reduce((sum, value) => sum + value, 0) / values.length)))
  return test && test.seasons >= LEAST_MONTHS ? test : null
}
