import type { TrendReading } from '../../../shared/utils/movement/series'

/** The trend of calculations §6 written out as it reads there, slowly and in no part with the program's own functions. */
export interface PlainTrend {
  activity: 'too-few-readings' | 'active' | 'dormant' | 'watch'
  slope: number
  interval: [number, number]
  s: number
  varS: number
  z: number
  p: number
  seasonSlopeAtLeast: number | null
  rises: string[]
}

const dayOf = (on: string) => Math.round(Date.parse(`${on}T00:00:00Z`) / 86_400_000)
const mean = (list: number[]) => list.reduce((a, b) => a + b, 0) / list.length
function median(list: number[]): number {
  const sorted = [...list].sort((a, b) => a - b)
  const half = sorted.length / 2
  return Number.isInteger(half) ? (sorted[half - 1]! + sorted[half]!) / 2 : sorted[Math.floor(half)]!
}

/** How many orderings of 1 … n have each S: the n-th value stands above those put before it and below those after. */
function orderingsByScore(n: number): Map<number, number> {
  if (n === 1) return new Map([[0, 1]])
  const counts = new Map<number, number>()
  for (const [s, ways] of orderingsByScore(n - 1)) {
    for (let place = 0; place < n; place++) counts.set(s + 2 * place - (n - 1), (counts.get(s + 2 * place - (n - 1)) ?? 0) + ways)
  }
  return counts
}
function exactTwoSided(s: number, n: number): { p: number, pRising: number } {
  const all = [...orderingsByScore(n)]
  const share = (least: number) => all.filter(([score]) => score >= least).reduce((sum, [, ways]) => sum + ways, 0) / all.reduce((sum, [, ways]) => sum + ways, 0)
  return { p: Math.min(1, 2 * share(Math.abs(s))), pRising: share(s) }
}

/** Chance of a standard normal value above z, by Simpson's rule. */
function normalAbove(z: number): number {
  const [from, to, parts] = [z, 9, 2000]
  const density = (x: number) => Math.exp(-x * x / 2) / Math.sqrt(2 * Math.PI)
  const step = (to - from) / parts
  return Array.from({ length: parts + 1 }, (_, i) => density(from + i * step) * (i === 0 || i === parts ? 1 : i % 2 === 1 ? 4 : 2)).reduce((a, b) => a + b, 0) * step / 3
}

/** Solves the normal equations by elimination with the largest pivot. */
function invert(matrix: number[][]): number[][] | null {
  const n = matrix.length
  const work = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))])
  for (let c = 0; c < n; c++) {
    const pivot = work.slice(c).reduce((best, row, i) => Math.abs(row[c]!) > Math.abs(work[best]![c]!) ? c + i : best, c)
    if (Math.abs(work[pivot]![c]!) < 1e-12) return null
    ;[work[c], work[pivot]] = [work[pivot]!, work[c]!]
    const by = work[c]![c]!
    work[c] = work[c]!.map(value => value / by)
    for (let r = 0; r < n; r++) {
      const times = work[r]![c]!
      if (r !== c) work[r] = work[r]!.map((value, k) => value - times * work[c]![k]!)
    }
  }
  return work.map(row => row.slice(n))
}

/** Student's t at 0.975: NIST/SEMATECH e-Handbook table 1.3.6.7.2, from 4 degrees of freedom to 30; the normal's expansion beyond. */
const T_975 = [2.776, 2.571, 2.447, 2.365, 2.306, 2.262, 2.228, 2.201, 2.179, 2.160, 2.145, 2.131, 2.120, 2.110, 2.101, 2.093, 2.086, 2.080, 2.074, 2.069, 2.064, 2.060, 2.056, 2.052, 2.048, 2.045, 2.042]
const t975 = (df: number) => T_975[df - 4] ?? 1.959963984540054 + 2.3722712 / df + 2.8224986 / df ** 2

function seasonSlopeAtLeast(years: number[], values: number[], sigma: number): number | null {
  const rows = years.map(t => [1, t, Math.sin(2 * Math.PI * t), Math.cos(2 * Math.PI * t)])
  const inverse = invert([0, 1, 2, 3].map(i => [0, 1, 2, 3].map(j => rows.reduce((sum, row) => sum + row[i]! * row[j]!, 0))))
  if (!inverse) return null
  const right = [0, 1, 2, 3].map(i => rows.reduce((sum, row, k) => sum + row[i]! * values[k]!, 0))
  const fit = inverse.map(row => row.reduce((sum, value, k) => sum + value * right[k]!, 0))
  const df = values.length - 4
  const residualSd = Math.sqrt(rows.reduce((sum, row, k) => sum + (values[k]! - row.reduce((a, x, i) => a + x * fit[i]!, 0)) ** 2, 0) / df)
  return fit[1]! - Math.max(t975(df) * residualSd, 1.959963984540054 * sigma) * Math.sqrt(inverse[1]![1]!)
}

function risesOf(days: { on: string, value: number, sigma: number }[]): string[] {
  return days.filter((day, i) => {
    const before = days.slice(Math.max(0, i - 3), i)
    if (before.length === 0) return false
    const sigma = Math.max(day.sigma, ...before.map(earlier => earlier.sigma))
    return day.value - median(before.map(earlier => earlier.value)) > Math.max(1, 4 * sigma)
  }).map(day => day.on)
}

export function plainTrend(readings: TrendReading[], seasonAllowance = 1.5): PlainTrend | null {
  const ons = [...new Set(readings.map(reading => reading.takenOn))].sort()
  const days = ons.map((on) => {
    const same = readings.filter(reading => reading.takenOn === on)
    return { on, value: mean(same.map(reading => reading.value)), sigma: Math.sqrt(same.reduce((sum, reading) => sum + reading.sigma ** 2, 0)) / same.length }
  })
  const n = days.length
  if (n < 4) return null
  const years = days.map(day => (dayOf(day.on) - dayOf(ons[0]!)) / 365.25)
  const values = days.map(day => day.value)
  const sigma = Math.sqrt(mean(days.map(day => day.sigma ** 2)))
  const span = years.at(-1)!
  const pairs = values.flatMap((_, i) => values.slice(i + 1).map((value, k) => ({ rise: value - values[i]!, gap: years[i + 1 + k]! - years[i]! })))
  const s = pairs.reduce((sum, { rise }) => sum + Math.sign(rise), 0)
  const ties = [...new Set(values)].map(value => values.filter(other => other === value).length)
  const varS = (n * (n - 1) * (2 * n + 5) - ties.reduce((sum, t) => sum + t * (t - 1) * (2 * t + 5), 0)) / 18
  const z = varS === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(varS)
  const hasTies = ties.some(t => t > 1)
  const { p, pRising } = n <= 10 && !hasTies ? exactTwoSided(s, n) : { p: 2 * normalAbove(Math.abs(z)), pRising: normalAbove(z) }
  const slopes = pairs.map(({ rise, gap }) => rise / gap).sort((a, b) => a - b)
  const slope = median(slopes)
  const N = slopes.length
  const C = 1.959963984540054 * Math.sqrt(varS)
  const ranked = (rank: number) => {
    const held = Math.min(N, Math.max(1, rank))
    return slopes[Math.floor(held) - 1]! * (1 - held % 1) + slopes[Math.ceil(held) - 1]! * (held % 1)
  }
  const least = 1.959963984540054 * sigma / Math.sqrt(years.reduce((sum, t) => sum + (t - mean(years)) ** 2, 0))
  const interval: [number, number] = [Math.min(ranked((N - C) / 2), slope - least), Math.max(ranked((N + C) / 2 + 1), slope + least)]
  const aYear = Math.round(span * 365.25) >= 365
  const atLeast = aYear && n >= 8 ? seasonSlopeAtLeast(years, values, sigma) : null
  const rise = slope * span
  const outgrows = atLeast === null ? rise > seasonAllowance + 2 * sigma : atLeast > 0
  const enough = n >= 6 && Math.round(span * 365.25) >= 90
  const active = pRising < 0.01 && rise >= 2 * sigma && outgrows
  const dormant = aYear && interval[0] >= -0.5 && interval[1] <= 0.5
  return { activity: !enough ? 'too-few-readings' : active ? 'active' : dormant ? 'dormant' : 'watch', slope, interval, s, varS, z, p, seasonSlopeAtLeast: atLeast, rises: risesOf(days) }
}
