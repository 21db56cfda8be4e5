import { linearRegression, median, standardDeviation } from 'simple-statistics'
import { describe, expect, it } from 'vitest'
import { leastSquares } from '../../../shared/utils/movement/leastSquares'
import { mannKendall, varianceOfS } from '../../../shared/utils/movement/mannKendall'
import { seasonFit } from '../../../shared/utils/movement/seasonFit'
import { seriesOf } from '../../../shared/utils/movement/series'
import { theilSen } from '../../../shared/utils/movement/theilSen'
import { monthly, normalOf, seeded } from './seeded'

/** The same quantities reached another way: the general library simple-statistics, or by brute force. */
describe('Against a second way, on random series', () => {
  const uniform = seeded(5)
  const samples = Array.from({ length: 40 }, () => {
    const n = 4 + Math.floor(uniform() * 30)
    const years = Array.from({ length: n }, (_, i) => i / 12 + uniform() / 24)
    return { years, values: years.map(year => 1 + 2 * year + normalOf(uniform)) }
  })

  it('the Theil–Sen slope is the median of all pairwise slopes', () => {
    for (const { years, values } of samples) {
      const slopes = years.flatMap((from, i) => years.slice(i + 1).map((to, k) => (values[i + 1 + k]! - values[i]!) / (to - from)))
      expect(theilSen(years, values, varianceOfS(values))!.slopePerYear).toBeCloseTo(median(slopes), 12)
    }
  })

  it('a straight least-squares line is the library’s linear regression', () => {
    for (const { years, values } of samples) {
      const line = linearRegression(years.map((year, i) => [year, values[i]!]))
      const [intercept, slope] = leastSquares([years.map(() => 1), years], values)!.coefficients
      expect(slope).toBeCloseTo(line.m, 8)
      expect(intercept).toBeCloseTo(line.b, 8)
    }
  })

  it('S counts rising less falling pairs', () => {
    for (const { values } of samples) {
      let rising = 0
      let falling = 0
      values.forEach((a, i) => values.slice(i + 1).forEach((b) => {
        if (b > a) rising++
        if (b < a) falling++
      }))
      expect(mannKendall(values)!.s).toBe(rising - falling)
    }
  })

  it('Var(S) is the spread of S over shuffled values, ties included', () => {
    const values = [1, 1, 2, 3, 3, 3, 5, 8, 9]
    const shuffled = Array.from({ length: 6000 }, () => {
      const order = [...values]
      for (let i = order.length - 1; i > 0; i--) {
        const j = Math.floor(uniform() * (i + 1));
        [order[i], order[j]] = [order[j]!, order[i]!]
      }
      return mannKendall(order)!.s
    })
    expect(standardDeviation(shuffled) ** 2 / varianceOfS(values)).toBeCloseTo(1, 1)
  })

  it('exact and normal chances agree roughly at ten values', () => {
    const values = [1, 2, 4, 3, 5, 7, 6, 8, 10, 9]
    const exact = mannKendall(values)!
    const normal = mannKendall([...values, 11])!
    expect(exact.exact).toBe(true)
    expect(normal.exact).toBe(false)
    expect(Math.abs(exact.p - normal.p)).toBeLessThan(0.001)
  })

  it('the season fit finds growth and season that were put in', () => {
    const readings = monthly(30, years => 3 + 1.2 * years + Math.sin(2 * Math.PI * (years + 0.3)) + 0.001 * normalOf(uniform), 0.001)
    const fit = seasonFit(seriesOf(readings))!
    expect(fit.slopePerYear).toBeCloseTo(1.2, 2)
    expect(fit.peakToPeak).toBeCloseTo(2, 2)
  })

  it('the 95 % interval of the slope holds the true slope about 95 times in 100', () => {
    let held = 0
    const runs = 800
    for (let run = 0; run < runs; run++) {
      const years = Array.from({ length: 15 }, (_, i) => i / 12)
      const values = years.map(year => 2 * year + 0.25 * normalOf(uniform))
      const [low, high] = theilSen(years, values, varianceOfS(values))!.interval
      if (low <= 2 && high >= 2) held++
    }
    expect(held / runs).toBeGreaterThan(0.925)
    expect(held / runs).toBeLessThan(0.98)
  })
})
