import { dayFromNumber, dayNumber } from '../days'
import { varianceOfS } from './mannKendall'
import { Z_975 } from './normal'
import { seriesOf, seriesSigma, spanDaysOf, timeSumOfSquares, yearsOf, type SeriesPoint, type TrendReading } from './series'
import { medianOf, theilSen, type TheilSen } from './theilSen'

/** All ours. */
const LEAST_READINGS = 3
const LEAST_DAYS = 60
const STILL_WITHIN_PER_YEAR = 2

export interface Neighbour { markId: string, readings: readonly TrendReading[] }

export type NeighbourMovement = 'same-way' | 'other-way' | 'still' | 'cannot-tell'

export interface NeighbourAnswer { markId: string, readingCount: number, slope: TheilSen | null, movement: NeighbourMovement }

/** Change from the calendar month before, in the readings' unit; null where one of the two was not read. */
export interface MonthChange { month: string, own: number | null, neighbours: number | null, neighbourCount: number }

export interface NeighbourControl {
  /** Correlation only: what others do in the same months speaks for or against a cause they share, and proves neither. */
  verdict: 'moves-alone' | 'some-move-too' | 'moves-with-others' | 'does-not-move' | 'cannot-tell'
  /** The days compared: those of the mark's own readings. */
  fromOn: string | null
  untilOn: string | null
  own: TheilSen | null
  neighbours: NeighbourAnswer[]
  months: MonthChange[]
}

function slopeOf(points: readonly SeriesPoint[]): TheilSen | null {
  if (points.length < LEAST_READINGS || spanDaysOf(points) < LEAST_DAYS) return null
  const years = yearsOf(points)
  const values = points.map(point => point.value)
  return theilSen(years, values, varianceOfS(values), Z_975 * seriesSigma(points) / Math.sqrt(timeSumOfSquares(years)))
}

/** +1 opening, −1 closing, 0 for what the interval does not tell from still. */
const directionOf = ({ interval: [low, high] }: TheilSen) => (low > 0 ? 1 : high < 0 ? -1 : 0)

function movementOf(slope: TheilSen | null, own: TheilSen | null): NeighbourMovement {
  if (!slope || !own) return 'cannot-tell'
  const direction = directionOf(slope)
  if (direction !== 0) return direction === directionOf(own) ? 'same-way' : 'other-way'
  // Still as far as this question goes: its interval leaves out a movement like the mark's own.
  const [low, high] = slope.interval
  return own.slopePerYear > high || own.slopePerYear < low ? 'still' : 'cannot-tell'
}

function verdictOf(own: TheilSen | null, neighbours: readonly NeighbourAnswer[]): NeighbourControl['verdict'] {
  if (!own) return 'cannot-tell'
  if (directionOf(own) === 0) return Math.max(Math.abs(own.interval[0]), Math.abs(own.interval[1])) <= STILL_WITHIN_PER_YEAR ? 'does-not-move' : 'cannot-tell'
  const told = neighbours.filter(({ movement }) => movement !== 'cannot-tell')
  const along = told.filter(({ movement }) => movement === 'same-way').length
  if (told.length === 0) return 'cannot-tell'
  if (along === 0) return 'moves-alone'
  return along >= told.length / 2 ? 'moves-with-others' : 'some-move-too'
}

/** Mean of each calendar month that was read. */
function monthlyMeans(points: readonly SeriesPoint[]): Map<string, number> {
  const values = new Map<string, number[]>()
  for (const { day, value } of points) {
    const month = dayFromNumber(day).slice(0, 7)
    values.set(month, [...values.get(month) ?? [], value])
  }
  return new Map([...values].map(([month, list]) => [month, list.reduce((sum, value) => sum + value, 0) / list.length]))
}

const monthBefore = (month: string) => dayFromNumber(dayNumber(`${month}-01`) - 1).slice(0, 7)

function changesOf(points: readonly SeriesPoint[]): Map<string, number> {
  const means = monthlyMeans(points)
  return new Map([...means].flatMap(([month, value]) => {
    const before = means.get(monthBefore(month))
    return before === undefined ? [] : [[month, value - before] as const]
  }))
}

function monthsOf(own: readonly SeriesPoint[], others: readonly (readonly SeriesPoint[])[]): MonthChange[] {
  const ownChanges = changesOf(own)
  const otherChanges = others.map(changesOf)
  const months = [...new Set([ownChanges, ...otherChanges].flatMap(changes => [...changes.keys()]))].sort()
  return months.map((month) => {
    const list = otherChanges.flatMap(changes => changes.get(month) ?? [])
    return { month, own: ownChanges.get(month) ?? null, neighbours: list.length > 0 ? medianOf(list) : null, neighbourCount: list.length }
  })
}

/**
 * Whether marks on other ceilings of the house moved in the same months: their Theil–Sen slopes over the days of the mark's
 * own readings, each with its interval, and the changes month by month. What moves them all is likelier weather, season or
 * the house than what lies above one of them.
 */
export function neighbourControl(readings: readonly TrendReading[], neighbours: readonly Neighbour[]): NeighbourControl {
  const points = seriesOf(readings)
  const first = points[0]
  const last = points.at(-1)
  const own = slopeOf(points)
  const within = neighbours.map(({ markId, readings: theirs }) => ({
    markId, points: seriesOf(theirs).filter(({ day }) => first !== undefined && day >= first.day && day <= last!.day),
  }))
  const answers = within.map(({ markId, points: theirs }) => {
    const slope = slopeOf(theirs)
    return { markId, readingCount: theirs.length, slope, movement: movementOf(slope, own) }
  })
  return {
    verdict: verdictOf(own, answers), own, neighbours: answers,
    fromOn: first ? dayFromNumber(first.day) : null, untilOn: last ? dayFromNumber(last.day) : null,
    months: monthsOf(points, within.map(neighbour => neighbour.points)),
  }
}
