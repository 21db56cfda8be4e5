import { describe, expect, it } from 'vitest'
import { addDays, daysBetween } from '../../../shared/utils/days'
import { OUR_LIMITS } from '../../../shared/types/limits'
import { METHODS_BY_KIND, READING_METHODS, WIDTH_COMPARISONS } from '../../../shared/types/mark'
import { detectableRate } from '../../../shared/utils/movement/detectableRate'
import { leastSquares } from '../../../shared/utils/movement/leastSquares'
import { mannKendall } from '../../../shared/utils/movement/mannKendall'
import { nextBestReadingOn } from '../../../shared/utils/movement/nextBestReading'
import { readingSigma, sigmaFromDoubleReadings } from '../../../shared/utils/movement/readingSigma'
import { seasonFit } from '../../../shared/utils/movement/seasonFit'
import { seriesOf, seriesSigma } from '../../../shared/utils/movement/series'
import { suddenRises } from '../../../shared/utils/movement/sudden'
import { theilSen } from '../../../shared/utils/movement/theilSen'
import { newestSegment, trendOptionsFor } from '../../../shared/utils/movement/trendOptions'
import { comparisonReading, rangeReading, WIDTH_RANGES } from '../../../shared/utils/movement/widthComparisons'
import { widthClass } from '../../../shared/utils/movement/widthClass'
import { monthly, readingsOn } from './seeded'

const plainCrack = { kind: 'crack', place: null, wallType: null, framing: null } as const

describe('Uncertainty of a reading', () => {
  it('gets smaller from a guess to calipers', () => {
    const sigmas = METHODS_BY_KIND.crack.map(method => readingSigma('crack', method))
    expect(sigmas).toEqual([1.0, 0.5, 0.4, 0.3, 0.2, 0.2, 0.1])
  })

  it('exists for exactly the methods that suit a kind', () => {
    for (const kind of ['crack', 'nail-pops', 'sag', 'stain'] as const) {
      for (const method of READING_METHODS) {
        const suits = METHODS_BY_KIND[kind].some(known => known === method)
        if (suits) expect(readingSigma(kind, method)).toBeGreaterThan(0)
        else expect(() => readingSigma(kind, method)).toThrow(RangeError)
      }
    }
  })

  it('from double readings is the spread of the differences over √2', () => {
    expect(sigmaFromDoubleReadings([[1, 1.2], [2, 1.8], [1.5, 1.7], [1.1, 0.9], [1, 1]])).toBeCloseTo(Math.sqrt(0.04 / 2), 10)
    expect(sigmaFromDoubleReadings([[1, 1.2], [2, 1.8]])).toBeNull()
    expect(() => sigmaFromDoubleReadings([[1, Number.NaN], [1, 1], [1, 1], [1, 1], [1, 1]])).toThrow(RangeError)
  })
})

describe('Widths by comparison', () => {
  it('leave no gap between one comparison and the next', () => {
    WIDTH_COMPARISONS.slice(1).forEach((comparison, i) => {
      expect(WIDTH_RANGES[comparison].atLeastMm).toBe(WIDTH_RANGES[WIDTH_COMPARISONS[i]!].atMostMm)
    })
  })

  it('become the middle of the range, never sharper than a card', () => {
    expect(comparisonReading('card')).toEqual({ widthMm: (0.76 + 1.35) / 2, sigmaMm: 0.5, atLeastMm: 0.76, atMostMm: 1.35 })
    expect(comparisonReading('finger').sigmaMm).toBeCloseTo((12 - 3.9) / Math.sqrt(12), 10)
  })

  it('without an upper bound are as coarse as a guess or coarser', () => {
    expect(comparisonReading('wider')).toEqual({ widthMm: 12, sigmaMm: 3, atLeastMm: 12, atMostMm: null })
  })

  it.each([[-1, 2], [2, 1], [2, 2], [Number.NaN, 1], [1, Infinity]])('from %f to %f is refused', (low, high) => {
    expect(() => rangeReading(low, high)).toThrow(RangeError)
  })

  it('a width class never comes without its caveat, and not for nonsense', () => {
    expect(widthClass(2).caveat).toBe('decoration-only')
    expect(() => widthClass(-0.1)).toThrow(RangeError)
    expect(() => widthClass(Number.NaN)).toThrow(RangeError)
  })
})

describe('A series', () => {
  it('averages same-day readings and their uncertainties', () => {
    const points = seriesOf(readingsOn([3, 3, 0], [2, 4, 1], 0.4))
    expect(points.map(point => point.value)).toEqual([1, 3])
    expect(points[0]!.sigma).toBeCloseTo(0.4, 12)
    expect(points[1]!.sigma).toBeCloseTo(0.4 / Math.SQRT2, 12)
  })

  it('has the root mean square of its uncertainties', () => {
    expect(seriesSigma(seriesOf([...readingsOn([0], [1], 0.3), ...readingsOn([9], [1], 0.4)]))).toBeCloseTo(Math.sqrt(0.125), 12)
  })

  it('keeps only the newest segment, since a repair starts a new one', () => {
    expect(newestSegment([{ segment: 1, n: 1 }, { segment: 2, n: 2 }, { segment: 2, n: 3 }]).map(({ n }) => n)).toEqual([2, 3])
    expect(newestSegment([])).toEqual([])
  })
})

describe('Sudden rises', () => {
  it('need more than 1 mm above the median of the three before', () => {
    expect(suddenRises(seriesOf(readingsOn([0, 1, 2, 3], [1, 1, 1, 2], 0.1)))).toEqual([])
    expect(suddenRises(seriesOf(readingsOn([0, 1, 2, 3], [1, 1, 1, 2.1], 0.1)))).toMatchObject([{ takenOn: '2026-01-04', baseline: 1, threshold: 1 }])
  })

  it('need four uncertainties with coarse readings', () => {
    expect(suddenRises(seriesOf(readingsOn([0, 1], [1, 2.9], 0.5)))).toEqual([])
    expect(suddenRises(seriesOf(readingsOn([0, 1], [1, 3.1], 0.5)))).toHaveLength(1)
  })

  it('are not raised when calipers follow a guess', () => {
    const guess = readingsOn([0], [1], 1)
    const calipers = readingsOn([7], [3.5], 0.1)
    expect(suddenRises(seriesOf([...guess, ...calipers]))).toEqual([])
  })

  it('never come from one reading', () => {
    expect(suddenRises(seriesOf(readingsOn([0], [30])))).toEqual([])
  })
})

describe('No answer where there is none', () => {
  it('for a slope without two days', () => {
    expect(theilSen([0, 0], [1, 2], 1)).toBeNull()
    expect(detectableRate(seriesOf(readingsOn([0], [1])), 0.2, 1.5)).toBeNull()
  })

  it('for a Mann–Kendall test below four values', () => {
    expect(mannKendall([1, 2, 3])).toBeNull()
  })

  it('for a season below eight readings or twelve months', () => {
    expect(seasonFit(seriesOf(monthly(11, () => 1)))).toBeNull()
    expect(seasonFit(seriesOf(readingsOn([0, 60, 120, 180, 240, 300, 400], [1, 1, 1, 1, 1, 1, 1])))).toBeNull()
    expect(seasonFit(seriesOf(monthly(13, () => 1)))).not.toBeNull()
  })

  it('for least squares whose columns say the same', () => {
    expect(leastSquares([[1, 1, 1], [2, 2, 2]], [1, 2, 3])).toBeNull()
    expect(leastSquares([[1, 1], [1, 2], [3, 9]], [1, 2])).toBeNull()
  })

  it('all equal values give z 0 and p 1', () => {
    const test = mannKendall(Array.from({ length: 12 }, () => 3))!
    expect(test).toMatchObject({ s: 0, varS: 0, z: 0 })
    expect(test.p).toBeCloseTo(1, 6)
  })
})

describe('Detectable rate and next best day', () => {
  it('falls with every month of readings', () => {
    const rates = [4, 6, 8, 10, 12, 14, 18, 24].map(n => detectableRate(seriesOf(monthly(n, () => 1)), 0.25, 1.5)!.perYear)
    rates.slice(1).forEach((rate, i) => expect(rate).toBeLessThan(rates[i]!))
  })

  it('is held up by the season before a year, by the readings after', () => {
    expect(detectableRate(seriesOf(monthly(6, () => 1)), 0.25, 1.5)!.limitedBy).toBe('season')
    expect(detectableRate(seriesOf(monthly(14, () => 1)), 0.25, 1.5)!.limitedBy).toBe('readings')
  })

  it('scales with the uncertainty once the season is known', () => {
    const points = seriesOf(monthly(20, () => 1))
    expect(detectableRate(points, 0.4, 1.5)!.perYear).toBeCloseTo(2 * detectableRate(points, 0.2, 1.5)!.perYear, 10)
  })

  it('the next best day lies between a week and a quarter after the last reading', () => {
    for (let n = 1; n <= 20; n++) {
      const readings = monthly(n, () => 1)
      const on = nextBestReadingOn(seriesOf(readings), 0.2, trendOptionsFor(plainCrack))!
      const gap = daysBetween(readings.at(-1)!.takenOn, on)
      expect(gap).toBeGreaterThanOrEqual(7)
      expect(gap).toBeLessThanOrEqual(91)
    }
  })

  it('while readings are missing they are spread so that the sixth ends the 90 days', () => {
    expect(nextBestReadingOn(seriesOf(readingsOn([0], [1])), 0.2, trendOptionsFor(plainCrack))).toBe(addDays('2026-01-01', 18))
  })
})

describe('A fitted season', () => {
  it('is clear when it stands out from the scatter, and not when it is all scatter', () => {
    expect(seasonFit(seriesOf(monthly(20, years => 3 + Math.sin(2 * Math.PI * years), 0.1)))!.isClear).toBe(true)
    expect(seasonFit(seriesOf(monthly(20, years => 3 + Math.sin(2 * Math.PI * years), 2)))!.isClear).toBe(false)
    expect(seasonFit(seriesOf(monthly(20, () => 3, 0.1)))!.isClear).toBe(false)
  })
})

describe('What a mark is allowed', () => {
  it('only interior wall corners under trusses get the uplift allowance', () => {
    const corner = { kind: 'crack', place: 'wall-ceiling-corner', wallType: 'interior', framing: 'trusses' } as const
    expect(trendOptionsFor(corner).seasonAllowance).toBe(20)
    expect(trendOptionsFor({ ...corner, wallType: 'outside' }).seasonAllowance).toBe(1.5)
    expect(trendOptionsFor({ ...corner, framing: 'rafters-and-joists' }).seasonAllowance).toBe(1.5)
    expect(trendOptionsFor({ ...corner, place: 'middle' }).seasonAllowance).toBe(1.5)
    expect(trendOptionsFor({ ...corner, kind: 'sag' }).seasonAllowance).toBe(1.5)
  })

  it('an organisation’s own limits stand in for ours, the larger allowance under trusses excepted', () => {
    const own = { ...OUR_LIMITS, seasonAllowanceMm: 0.8, leastReadings: 8, leastDays: 120, pRising: 0.02, leastJumpMm: 0.7, jumpSigmas: 3, dormantWithinMmPerYear: 0.3 }
    expect(trendOptionsFor(plainCrack, own)).toEqual({ seasonAllowance: 0.8, dormantWithinPerYear: 0.3, leastJump: 0.7, jumpSigmas: 3, leastReadings: 8, leastDays: 120, pRising: 0.02 })
    expect(trendOptionsFor({ kind: 'crack', place: 'wall-ceiling-corner', wallType: 'interior', framing: 'trusses' }, own).seasonAllowance).toBe(20)
  })

  it('a stain is judged in centimetres', () => {
    expect(trendOptionsFor({ kind: 'stain', place: null, wallType: null, framing: null }).leastJump).toBeGreaterThanOrEqual(10)
  })
})
