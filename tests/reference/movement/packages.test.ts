import { jStat } from 'jstat'
import { TheilSenRegression } from 'ml-regression-theil-sen'
import { linearRegression } from 'simple-statistics'
import { describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import { leastSquares } from '../../../shared/utils/movement/leastSquares'
import { varianceOfS } from '../../../shared/utils/movement/mannKendall'
import { normalBelow, Z_80, Z_95, Z_975, Z_99 } from '../../../shared/utils/movement/normal'
import { seriesOf, yearsOf } from '../../../shared/utils/movement/series'
import { theilSen } from '../../../shared/utils/movement/theilSen'
import { tQuantile975 } from '../../../shared/utils/movement/tQuantile'
import { markTrend } from '../../../shared/utils/movement/trend'
import { normalOf, seeded } from '../../unit/movement/seeded'

/**
 * Against general statistics packages on random series: ml-regression-theil-sen, jstat, simple-statistics (error function and
 * regression; the first of these the program itself uses). Our own slope stays because the package takes the lower of two
 * middle slopes, gives no interval and fails where readings share a day; our own straight line because it gives no answer there.
 */
const uniform = seeded(61)
const samples = Array.from({ length: 200 }, (_, i) => {
  const n = 3 + Math.floor(uniform() * 40)
  const times = Array.from({ length: n }, (_, k) => k / 12 + uniform() / 20)
  // Every second one is rounded, so that values tie.
  const values = times.map(time => 2 + 1.5 * time + 0.4 * normalOf(uniform)).map(value => i % 2 === 0 ? value : Math.round(value * 2) / 2)
  return { times, values }
})

const pairsOf = (n: number) => n * (n - 1) / 2
const isOdd = (n: number) => n % 2 === 1

describe('Theil–Sen against ml-regression-theil-sen 3.0.0', () => {
  it('gives the same slope on random series, half of them with ties, wherever the number of pairs is odd', () => {
    const compared = samples.filter(({ times }) => isOdd(pairsOf(times.length)))
    expect(compared.length).toBeGreaterThan(70)
    for (const { times, values } of compared) {
      expect(theilSen(times, values, varianceOfS(values))!.slopePerYear).toBeCloseTo(new TheilSenRegression(times, values).slope, 10)
    }
  })

  it('gives the middle between two slopes where the number is even; the package takes the lower one, which on short series is wrong', () => {
    const times = [0, 1, 2, 3]
    const values = [0, 1, 1, 7]
    const slopes = [0, 0.5, 1, 7 / 3, 3, 6]
    expect(theilSen(times, values, varianceOfS(values))!.slopePerYear).toBeCloseTo((slopes[2]! + slopes[3]!) / 2, 12)
    expect(new TheilSenRegression(times, values).slope).toBe(slopes[2])
    for (const sample of samples.filter(({ times: { length } }) => !isOdd(pairsOf(length)))) {
      expect(theilSen(sample.times, sample.values, varianceOfS(sample.values))!.slopePerYear).toBeGreaterThanOrEqual(new TheilSenRegression(sample.times, sample.values).slope)
    }
  })

  it('gives the same slope and level through the whole trend of a mark, same-day readings averaged first', () => {
    const long = samples.filter(({ values }) => values.length >= 7 && isOdd(values.length) && isOdd(pairsOf(values.length)))
    expect(long.length).toBeGreaterThan(20)
    for (const { values } of long) {
      const readings = values.flatMap((value, i) => [value, ...(i % 5 === 0 ? [value + 0.2] : [])].map(read => ({ takenOn: addDays('2025-01-01', i * 30), value: read, sigma: 0.3 })))
      const points = seriesOf(readings)
      const line = new TheilSenRegression(yearsOf(points), points.map(point => point.value))
      const trend = markTrend(readings)
      if (trend.kind !== 'measured') throw new Error('expected a measured trend')
      expect(trend.slopePerYear).toBeCloseTo(line.slope, 10)
      expect(trend.levelAtStart).toBeCloseTo(line.intercept, 10)
    }
  })

  it('says there is no slope where all readings are of one day; the package throws', () => {
    expect(() => new TheilSenRegression([1, 1, 1], [1, 2, 3])).toThrow()
    expect(theilSen([1, 1, 1], [1, 2, 3], 1)).toBeNull()
  })
})

describe('Straight lines against simple-statistics', () => {
  it('are the same on 200 random series', () => {
    for (const { times, values } of samples) {
      const line = linearRegression(times.map((time, i) => [time, values[i]!]))
      const [intercept, slope] = leastSquares([times.map(() => 1), times], values)!.coefficients
      expect(slope).toBeCloseTo(line.m, 8)
      expect(intercept).toBeCloseTo(line.b, 8)
    }
  })

  it('have no answer on equal dates, where the package gives one that is none', () => {
    expect(Number.isFinite(linearRegression([[1, 1], [1, 2], [1, 3]]).m)).toBe(false)
    expect(leastSquares([[1, 1, 1], [1, 1, 1]], [1, 2, 3])).toBeNull()
  })
})

describe('Quantiles against jstat 1.9.6', () => {
  it('normal quantiles agree to eight digits', () => {
    for (const [z, p] of [[Z_80, 0.8], [Z_95, 0.95], [Z_975, 0.975], [Z_99, 0.99]] as const) expect(z).toBeCloseTo(jStat.normal.inv(p, 0, 1), 8)
  })

  it('chances below a normal value agree within 2e-7', () => {
    for (let z = -5; z <= 5; z += 0.05) expect(Math.abs(normalBelow(z) - jStat.normal.cdf(z, 0, 1))).toBeLessThan(2e-7)
  })

  it('Student’s t agrees to three decimals from 1 to 200 degrees of freedom', () => {
    for (let df = 1; df <= 200; df++) expect(Math.abs(tQuantile975(df) - jStat.studentt.inv(0.975, df))).toBeLessThan(0.0006)
  })
})
