import type { LoadField, PlacedItem } from '../shared/types/loadPlan.ts'
import { addDays } from '../shared/utils/days.ts'
import type { TrendReading } from '../shared/utils/movement/series.ts'
import { markTrend } from '../shared/utils/movement/trend.ts'
import { loadPlan } from '../shared/utils/structure/loadPlan.ts'

const REPEATS = 200
const WARM_UP = 40

const field: LoadField = {
  spanFt: 14, spacingIn: 16, joistCount: 13, ratedPsf: 20, joistEiLbIn2: 1.4e6 * 47.63,
  strongbacks: [{ atFt: 7, eiLbIn2: 1.3e6 * 98.93 }],
}

/** An invented stock: two hundred boxes in rows over the whole field, none two alike. */
const items: PlacedItem[] = Array.from({ length: 200 }, (_, n) => ({
  id: `box-${n}`, xFt: 0.2 + (n % 14) * 0.9, yFt: 0.1 + Math.floor(n / 14) * 0.95, lengthFt: 1.2 + (n % 3) * 0.2, widthFt: 1 + (n % 4) * 0.2, weightLb: 12 + (n % 9) * 4,
}))

/** Five invented years of monthly readings: a slow growth under a season. */
const readings: TrendReading[] = Array.from({ length: 60 }, (_, n) => ({
  takenOn: addDays('2021-01-15', Math.round(n * 30.4)), value: 0.8 + n * 0.008 + 0.15 * Math.sin(n * Math.PI / 6) + (n % 5) * 0.02, sigma: 0.1,
}))

function timeOf(work: () => unknown) {
  const times = Array.from({ length: WARM_UP + REPEATS }, () => {
    const startedAt = performance.now()
    work()
    return performance.now() - startedAt
  }).slice(WARM_UP).sort((a, b) => a - b)
  const at = (share: number) => times[Math.ceil(share * times.length) - 1] ?? NaN
  return { p50Ms: at(0.5), p95Ms: at(0.95) }
}

console.log(JSON.stringify([
  { name: 'load plan of 13 joists and 200 items', ...timeOf(() => loadPlan(field, items)) },
  { name: 'trend of a mark with 60 readings', ...timeOf(() => markTrend(readings)) },
]))
