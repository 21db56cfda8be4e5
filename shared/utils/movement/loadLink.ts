import { dayNumber } from '../days'
import { varianceOfS } from './mannKendall'
import { Z_975 } from './normal'
import { seriesOf, seriesSigma, timeSumOfSquares, yearsOf, type SeriesPoint, type TrendReading } from './series'
import { theilSen, type TheilSen } from './theilSen'

/** Weight above the mark from this day on. */
export interface LoadStep { on: string, totalLb: number }

/** Ours. */
export const LEAST_LOAD_CHANGE_LB = 50
const LEAST_READINGS_EACH_SIDE = 3
const NO_CHANGE_WITHIN_PER_YEAR = 2

export interface LoadLink {
  changedOn: string
  changeLb: number
  readingsBefore: number
  readingsAfter: number
  before: TheilSen | null
  after: TheilSen | null
  /** Correlation, never blame. */
  verdict: 'began-after' | 'eased-after' | 'no-change' | 'cannot-tell'
}

function slopeOf(points: SeriesPoint[]): TheilSen | null {
  if (points.length < LEAST_READINGS_EACH_SIDE) return null
  const years = yearsOf(points)
  const values = points.map(point => point.value)
  return theilSen(years, values, varianceOfS(values), Z_975 * seriesSigma(points) / Math.sqrt(timeSumOfSquares(years)))
}

function verdictOf(before: TheilSen | null, after: TheilSen | null): LoadLink['verdict'] {
  if (!before || !after) return 'cannot-tell'
  const difference = after.slopePerYear - before.slopePerYear
  const half = (slope: TheilSen) => (slope.interval[1] - slope.interval[0]) / 2
  const margin = Math.hypot(half(before), half(after))
  if (difference - margin > 0 && after.interval[0] > 0) return 'began-after'
  if (difference + margin < 0 && before.interval[0] > 0) return 'eased-after'
  return Math.abs(difference) + margin <= NO_CHANGE_WITHIN_PER_YEAR ? 'no-change' : 'cannot-tell'
}

/** Days on which the weight changed by enough, with the change in lb; the first step is a beginning, not a change. */
function changesOf(steps: readonly LoadStep[]): { on: string, changeLb: number }[] {
  const inOrder = [...steps].sort((a, b) => dayNumber(a.on) - dayNumber(b.on))
  const lastOfDay = inOrder.filter((step, i) => inOrder[i + 1]?.on !== step.on)
  return lastOfDay.slice(1)
    .map((step, i) => ({ on: step.on, changeLb: step.totalLb - lastOfDay[i]!.totalLb }))
    .filter(change => Math.abs(change.changeLb) >= LEAST_LOAD_CHANGE_LB)
}

/**
 * For each change of weight above a mark: how it moved before and after, each side reaching to the neighbouring change.
 * A reading on the day of the change counts as before it.
 */
export function loadLinks(readings: readonly TrendReading[], steps: readonly LoadStep[]): LoadLink[] {
  for (const step of steps) {
    if (!(Number.isFinite(step.totalLb) && step.totalLb >= 0)) throw new RangeError(`Weight above must be zero or more: ${step.totalLb}`)
  }
  const points = seriesOf(readings)
  const changes = changesOf(steps)
  return changes.map((change, i) => {
    const day = dayNumber(change.on)
    const from = i === 0 ? -Infinity : dayNumber(changes[i - 1]!.on)
    const to = i === changes.length - 1 ? Infinity : dayNumber(changes[i + 1]!.on)
    const beforePoints = points.filter(point => point.day > from && point.day <= day)
    const afterPoints = points.filter(point => point.day > day && point.day <= to)
    const before = slopeOf(beforePoints)
    const after = slopeOf(afterPoints)
    return {
      changedOn: change.on, changeLb: change.changeLb,
      readingsBefore: beforePoints.length, readingsAfter: afterPoints.length,
      before, after, verdict: verdictOf(before, after),
    }
  })
}
