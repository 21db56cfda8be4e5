import { dayNumber } from '~/shared/utils/days'

/** What the chart of one mark shows; all in the unit of the readings. */
export interface MarkChartData {
  readings: readonly { takenOn: string, value: number, sigma: number, segment: number }[]
  /** The measured trend of the newest segment, as markTrend gives it; null while there is none. */
  trend?: { slopePerYear: number, interval: readonly [number, number], levelAtStart: number, startOn: string, endOn: string } | null
  repairs?: readonly { on: string, label: string }[]
  /** The day of the newest reading, where it jumped. */
  suddenOn?: string | null
  /** Weight above from that day on. */
  loadSteps?: readonly { on: string, weightLb: number }[]
}

export type Point = { x: number, y: number | null }
export type RangePoint = { x: number, y: [number, number] }

const msPerDay = 86_400_000
const daysPerYear = 365.25

export const timeOf = (day: string) => dayNumber(day) * msPerDay

/** Both charts share this axis: all readings, repairs and changes of load, with a little air. */
export function timeRange({ readings, repairs = [], loadSteps = [] }: MarkChartData): { min: number, max: number } {
  const times = [...readings.map(r => r.takenOn), ...repairs.map(r => r.on)].map(timeOf)
  const steps = loadSteps.map(step => timeOf(step.on))
  if (times.length === 0 && steps.length === 0) return { min: 0, max: msPerDay }
  const first = Math.min(...(times.length > 0 ? times : steps))
  const last = Math.max(...times, ...steps)
  const air = Math.max((last - first) * 0.04, 7 * msPerDay)
  return { min: first - air, max: last + air }
}

/** Readings of one segment hang together; a repair breaks the line. */
export function readingPoints({ readings }: MarkChartData): Point[] {
  return sorted(readings).map(({ takenOn, value }) => ({ x: timeOf(takenOn), y: value }))
}

/** One upright stroke of ±1.96 σ a reading, with caps, as one broken line. The charting library drops the first point after a break, so it stands twice. */
export function errorBars(data: MarkChartData): Point[] {
  const { min, max } = timeRange(data)
  const cap = (max - min) * 0.006
  return sorted(data.readings).flatMap(({ takenOn, value, sigma }) => {
    const x = timeOf(takenOn)
    const [low, high] = [Math.max(0, value - 1.96 * sigma), value + 1.96 * sigma]
    return [
      { x: x - cap, y: low }, { x: x - cap, y: low }, { x: x + cap, y: low }, { x, y: low }, { x, y: high }, { x: x - cap, y: high }, { x: x + cap, y: high }, { x: x + cap, y: null },
    ]
  })
}

/** The line of the trend, from the first to the last day of its segment. */
export function trendLine({ trend }: MarkChartData): Point[] {
  if (!trend) return []
  return [{ x: timeOf(trend.startOn), y: trend.levelAtStart }, { x: timeOf(trend.endOn), y: trend.levelAtStart + trend.slopePerYear * yearsOf(trend) }]
}

/** Every line whose slope lies in the 95 % interval, turned about the middle of the dates. */
export function trendBand({ trend }: MarkChartData): RangePoint[] {
  if (!trend) return []
  const years = yearsOf(trend)
  const middle = trend.levelAtStart + trend.slopePerYear * years / 2
  return [0, 0.25, 0.5, 0.75, 1].map((share) => {
    const ends = trend.interval.map(slope => middle + slope * years * (share - 0.5))
    return { x: timeOf(trend.startOn) + share * (timeOf(trend.endOn) - timeOf(trend.startOn)), y: [Math.min(...ends), Math.max(...ends)] }
  })
}

/** The weight above as steps: it holds from its day until the next. */
export function loadLine(data: MarkChartData): Point[] {
  const steps = [...(data.loadSteps ?? [])].sort((a, b) => a.on.localeCompare(b.on))
  if (steps.length === 0) return []
  const { min, max } = timeRange(data)
  const before = steps.filter(step => timeOf(step.on) <= min).at(-1)
  const within = steps.filter(step => timeOf(step.on) > min)
  return [
    { x: min, y: before?.weightLb ?? 0 },
    ...within.map(step => ({ x: timeOf(step.on), y: step.weightLb })),
    { x: max, y: (within.at(-1) ?? before)?.weightLb ?? 0 },
  ]
}

function yearsOf(trend: { startOn: string, endOn: string }): number {
  return (dayNumber(trend.endOn) - dayNumber(trend.startOn)) / daysPerYear
}

function sorted(readings: MarkChartData['readings']) {
  return [...readings].sort((a, b) => a.takenOn.localeCompare(b.takenOn))
}
