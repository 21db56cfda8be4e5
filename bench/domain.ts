import type { LoadField, PlacedItem } from '../shared/types/loadPlan.ts'
import { addDays } from '../shared/utils/days.ts'
import type { TrendReading } from '../shared/utils/movement/series.ts'
import { markTrend } from '../shared/utils/movement/trend.ts'
import { weakestMember } from '../shared/utils/structure/loadField.ts'
import { judgeLoadPlan } from '../shared/utils/structure/judgeLoadPlan.ts'
import { loadPlan } from '../shared/utils/structure/loadPlan.ts'
import { whereMayItGo } from '../shared/utils/structure/whereMayItGo.ts'
import { stationMap, stationPlan } from './stationByStation.ts'

const REPEATS = 200
const WARM_UP = 40

const field: LoadField = {
  spanFt: 14, spacingIn: 16, joistCount: 13, ratedPsf: 20, joistEiLbIn2: 1.4e6 * 47.63,
  strongbacks: [{ atFt: 7, eiLbIn2: 1.3e6 * 98.93 }],
}

/** An invented stock: boxes in rows over the whole field, none two alike. */
const stock = (count: number, columns: number, columnFt: number, rowFt: number): PlacedItem[] => Array.from({ length: count }, (_, n) => ({
  id: `box-${n}`, xFt: 0.2 + (n % columns) * columnFt, yFt: 0.1 + Math.floor(n / columns) * rowFt,
  lengthFt: 1.2 + (n % 3) * 0.2, widthFt: 1 + (n % 4) * 0.2, weightLb: 12 + (n % 9) * 4,
}))
const items = stock(200, 14, 0.9, 0.95)

/** 20 by 20 ft: sixteen joists at 16 in. */
const wide: LoadField = { ...field, spanFt: 20, joistCount: 16, strongbacks: [] }
const sixty = stock(60, 10, 1.85, 3.1)
const trunk = { lengthFt: 2, widthFt: 2, weightLb: 60 }
const member = weakestMember()

/** Five invented years of monthly readings: a slow growth under a season. */
const readings: TrendReading[] = Array.from({ length: 60 }, (_, n) => ({
  takenOn: addDays('2021-01-15', Math.round(n * 30.4)), value: 0.8 + n * 0.008 + 0.15 * Math.sin(n * Math.PI / 6) + (n % 5) * 0.02, sigma: 0.1,
}))

function timeOf(work: () => unknown, repeats = REPEATS, warmUp = WARM_UP) {
  const times = Array.from({ length: warmUp + repeats }, () => {
    const startedAt = performance.now()
    work()
    return performance.now() - startedAt
  }).slice(warmUp).sort((a, b) => a - b)
  const at = (share: number) => times[Math.ceil(share * times.length) - 1] ?? NaN
  return { p50Ms: at(0.5), p95Ms: at(0.95) }
}

console.log(JSON.stringify([
  {
    name: 'load plan of 13 joists and 200 items', mostP50Ms: 4, ...timeOf(() => loadPlan(field, items)),
    plainP50Ms: timeOf(() => stationPlan(field, items), 20, 5).p50Ms,
  },
  { name: 'the whole verdict on 13 joists and 200 items', mostP50Ms: 4, ...timeOf(() => judgeLoadPlan(field, items, { member })) },
  {
    name: 'where it may go: 20 × 20 ft, ½ ft grid, 60 items', mostP50Ms: 40, ...timeOf(() => whereMayItGo(wide, sixty, trunk, { member })),
    plainP50Ms: timeOf(() => stationMap(wide, sixty, trunk, member), 3, 1).p50Ms,
  },
  { name: 'trend of a mark with 60 readings', mostP50Ms: 1, ...timeOf(() => markTrend(readings)) },
]))
