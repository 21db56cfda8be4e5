import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import { leastSquares } from '../../../shared/utils/movement/leastSquares'
import { mannKendall } from '../../../shared/utils/movement/mannKendall'
import { normalBelow, Z_80, Z_95, Z_975, Z_99 } from '../../../shared/utils/movement/normal'
import { seasonalKendall } from '../../../shared/utils/movement/seasonalKendall'
import { tQuantile975 } from '../../../shared/utils/movement/tQuantile'
import { markTrend } from '../../../shared/utils/movement/trend'

function columns(file: string): number[][] {
  const rows = readFileSync(new URL(`../data/${file}`, import.meta.url), 'utf8').trim().split('\n').slice(1)
  const cells = rows.map(row => row.split(',').map(Number))
  return cells[0]!.map((_, i) => cells.map(row => row[i]!))
}

describe('NIST StRD Norris (linear regression, certified values)', () => {
  const [x = [], y = []] = columns('nist-strd-norris.csv')
  const fit = leastSquares([x.map(() => 1), x], y)!

  it('gives the certified intercept and slope to ten digits', () => {
    expect(x).toHaveLength(36)
    expect(fit.coefficients[0]).toBeCloseTo(-0.262323073774029, 10)
    expect(fit.coefficients[1]).toBeCloseTo(1.00211681802045, 11)
  })

  it('gives the certified residual standard deviation and the standard error of the slope (certified values from memory)', () => {
    const residualSd = Math.sqrt(fit.residualSumOfSquares / fit.degreesOfFreedom)
    expect(residualSd).toBeCloseTo(0.884796396144373, 9)
    expect(residualSd * Math.sqrt(fit.unitVariances[1]!)).toBeCloseTo(0.000429796848199937, 12)
  })
})

describe('EPA QA/G-9S, Mann–Kendall example with ties', () => {
  const [t = [], y = []] = columns('epa-qag9s-mann-kendall-ties.csv')

  it('gives S 22, Var(S) 155.33 and Z 1.685', () => {
    const test = mannKendall(y)!
    expect(test.s).toBe(22)
    expect(test.varS).toBeCloseTo(155.33, 2)
    expect(test.z).toBeCloseTo(1.685, 3)
    expect(test.exact).toBe(false)
  })

  it('is reached through the entry point on a mark’s dated readings too', () => {
    const trend = markTrend(t.map((step, i) => ({ takenOn: addDays('2026-01-01', step * 10), value: y[i]!, sigma: 1 })))
    expect(trend.kind).toBe('measured')
    expect(trend.mannKendall).toMatchObject({ s: 22 })
    expect(trend.mannKendall!.p).toBeCloseTo(2 * (1 - 0.954), 2)
  })

  it('is given for a small example with too few readings for a verdict', () => {
    const trend = markTrend([5, 6, 7, 8].map((value, i) => ({ takenOn: addDays('2026-01-01', i), value, sigma: 1 })))
    expect(trend.kind).toBe('too few readings')
    expect(trend.mannKendall).toMatchObject({ s: 6, exact: true })
  })
})

describe('EPA Unified Guidance 2009, example 14-10: seasonal Kendall', () => {
  const [month = [], , concentration = []] = columns('epa-ug-ex14-10-seasonal-kendall.csv')
  const seasons = Array.from({ length: 12 }, (_, i) => concentration.filter((_, row) => month[row] === i + 1))

  it('gives S 35 over twelve months of three years, standard deviation 6.557 and Z 5.18 (published results from memory)', () => {
    expect(seasons.map(values => values.length)).toEqual(Array.from({ length: 12 }, () => 3))
    const test = seasonalKendall(seasons)!
    expect(test).toMatchObject({ s: 35, varS: expect.closeTo(43, 9), seasons: 12 })
    expect(Math.sqrt(test.varS)).toBeCloseTo(6.557, 3)
    expect(test.z).toBeCloseTo(5.18, 2)
    expect(test.p).toBeLessThan(1e-6)
  })

  it('is reached through the trend of a mark with the same dated values', () => {
    const trend = markTrend(concentration.map((value, row) => ({ takenOn: `${1983 + Math.floor(row / 12)}-${String(month[row]).padStart(2, '0')}-15`, value, sigma: 0.01 })))
    expect(trend).toMatchObject({ kind: 'measured', sameMonths: { s: 35, varS: expect.closeTo(43, 9) } })
  })

  it('has no answer for one season, or below two years of a mark', () => {
    expect(seasonalKendall([[1, 2, 3]])).toBeNull()
    expect(seasonalKendall([[1], [2], [3]])).toBeNull()
    const year = markTrend(concentration.slice(0, 20).map((value, row) => ({ takenOn: addDays('1983-01-15', row * 30), value, sigma: 0.01 })))
    expect(year).toMatchObject({ kind: 'measured', sameMonths: null })
  })
})

describe('Mann–Kendall exact probabilities (EPA QA/G-9S table A-11 and Gilbert 1987 table A18, from memory)', () => {
  /** An ordering of 1…n with a given S: start rising and swap neighbours until enough pairs fall. */
  function orderingWithS(n: number, s: number): number[] {
    const order = Array.from({ length: n }, (_, i) => i + 1)
    let swaps = (n * (n - 1) / 2 - s) / 2
    for (let pass = 0; pass < n && swaps > 0; pass++) {
      for (let i = 0; i < n - 1 && swaps > 0; i++) {
        if (order[i]! < order[i + 1]!) {
          [order[i], order[i + 1]] = [order[i + 1]!, order[i]!]
          swaps--
        }
      }
    }
    return order
  }

  it.each([
    [4, 0, 0.625], [4, 2, 0.375], [4, 4, 0.167], [4, 6, 0.042],
    [5, 4, 0.242], [5, 6, 0.117], [5, 8, 0.042], [5, 10, 0.0083],
    [6, 7, 0.136], [6, 9, 0.068], [6, 11, 0.028], [6, 13, 0.0083], [6, 15, 0.0014],
    [10, 21, 0.036],
  ])('with %i values and S of %i the chance is %f', (n, s, chance) => {
    const test = mannKendall(orderingWithS(n, s))!
    expect(test.s).toBe(s)
    expect(test.exact).toBe(true)
    expect(Math.abs(test.pRising - chance)).toBeLessThan(0.0006)
  })
})

describe('Quantiles (NIST/SEMATECH e-Handbook tables 1.3.6.7.1 and 1.3.6.7.2)', () => {
  it.each([[0, 0.5], [1, 0.84134], [1.645, 0.95002], [1.96, 0.975], [2.33, 0.9901], [3, 0.99865]])('a normal value is below %f with chance %f', (z, chance) => {
    expect(normalBelow(z)).toBeCloseTo(chance, 5)
    expect(normalBelow(-z)).toBeCloseTo(1 - chance, 5)
  })

  it('names its normal quantiles rightly', () => {
    for (const [z, chance] of [[Z_80, 0.8], [Z_95, 0.95], [Z_975, 0.975], [Z_99, 0.99]] as const) expect(normalBelow(z)).toBeCloseTo(chance, 6)
  })

  it.each([[1, 12.706], [10, 2.228], [30, 2.042], [40, 2.021], [60, 2.000], [100, 1.984]])('t with %i degrees of freedom is %f', (df, t) => {
    expect(tQuantile975(df)).toBeCloseTo(t, 3)
  })
})
