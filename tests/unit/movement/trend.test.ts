import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import { markActivity, markTrend, type MeasuredTrend } from '../../../shared/utils/movement/trend'
import type { TrendReading } from '../../../shared/utils/movement/series'
import { monthly, readingsOn } from './seeded'

function measured(readings: TrendReading[], options = {}): MeasuredTrend {
  const trend = markTrend(readings, options)
  if (trend.kind !== 'measured') throw new Error('expected a measured trend')
  return trend
}

describe('Too few readings', () => {
  it('says how many are missing and the first day they can suffice', () => {
    expect(markTrend(readingsOn([0, 7, 21], [1, 1, 1]))).toMatchObject({
      kind: 'too few readings', activity: 'too-few-readings', needed: 6, missing: 3, enoughOn: '2026-04-01', readingCount: 3, spanDays: 21,
    })
  })

  it('is the answer for no reading at all, without dates', () => {
    expect(markTrend([])).toMatchObject({ kind: 'too few readings', missing: 6, enoughOn: null, nextBestOn: null, sigma: null, mannKendall: null, sudden: null })
  })

  it('holds until the readings span 90 days, and no longer', () => {
    const values = [1, 1, 1, 1, 1, 1]
    expect(markTrend(readingsOn([0, 10, 20, 30, 40, 89], values)).kind).toBe('too few readings')
    expect(markTrend(readingsOn([0, 10, 20, 30, 40, 90], values)).kind).toBe('measured')
  })

  it('counts same-day readings once', () => {
    expect(markTrend(readingsOn([0, 0, 0, 0, 0, 0, 120], [1, 2, 3, 1, 2, 3, 2])).readingCount).toBe(2)
  })
})

describe('Slope and activity', () => {
  it('gives the slope of an exact line in mm a year of 365.25 days', () => {
    const trend = measured(monthly(13, years => 1 + 2.5 * years))
    expect(trend.slopePerYear).toBeCloseTo(2.5, 10)
    expect(trend.levelAtStart).toBeCloseTo(1, 10)
    expect(trend.rise).toBeCloseTo(2.5 * trend.spanDays / 365.25, 10)
  })

  it('is active for steady growth, and names the first day it was sure', () => {
    const trend = measured(monthly(13, years => 1 + 6 * years))
    expect(trend.activity).toBe('active')
    const sinceIndex = trend.activeSince!
    expect(sinceIndex > trend.startOn && sinceIndex <= trend.endOn).toBe(true)
    const upTo = monthly(13, years => 1 + 6 * years).filter(reading => reading.takenOn <= sinceIndex)
    expect(markTrend(upTo).activity).toBe('active')
    expect(markTrend(upTo.slice(0, -1)).activity).not.toBe('active')
  })

  it('only watches growth within the season allowance before a year has passed', () => {
    const halfYear = monthly(7, years => 1 + 3 * years)
    expect(measured(halfYear).activity).toBe('watch')
    expect(measured(halfYear).season).toBeNull()
    expect(measured(halfYear, { seasonAllowance: 0.5 }).activity).toBe('active')
  })

  it('allows 20 mm at interior corners under trusses before a year has passed', () => {
    const uplift = monthly(7, years => 1 + 30 * years)
    expect(measured(uplift).activity).toBe('active')
    expect(measured(uplift, { seasonAllowance: 20 }).activity).toBe('watch')
  })

  it('is dormant after a quiet year, and only then', () => {
    expect(measured(monthly(14, () => 2, 0.1)).activity).toBe('dormant')
    expect(measured(monthly(11, () => 2, 0.1)).activity).toBe('watch')
  })

  it('is not dormant when the readings are too coarse to tell', () => {
    expect(measured(monthly(14, () => 2, 1)).activity).toBe('watch')
  })

  it('never gives an interval narrower than the readings’ own error', () => {
    const trend = measured(monthly(13, years => 1 + years, 0.4))
    const [low, high] = trend.interval
    const times = monthly(13, () => 0).map((_, i) => Math.round(i * 365.25 / 12) / 365.25)
    const mean = times.reduce((a, b) => a + b) / 13
    const half = 1.959964 * 0.4 / Math.sqrt(times.reduce((sum, t) => sum + (t - mean) ** 2, 0))
    expect(high - trend.slopePerYear).toBeCloseTo(half, 5)
    expect(trend.slopePerYear - low).toBeCloseTo(half, 5)
  })

  it('says from when a season can be ruled out: a year after the first reading, and with the missing ones at one a month', () => {
    expect(measured(readingsOn([0, 20, 40, 60, 80, 100], [1, 1, 1, 1, 1, 1])).seasonRuledOutFrom).toBe('2027-01-01')
    expect(measured(readingsOn([0, 70, 140, 210, 280, 350], [1, 1, 1, 1, 1, 1])).seasonRuledOutFrom).toBe(addDays('2026-01-01', 410))
    expect(measured(monthly(14, () => 1)).seasonRuledOutFrom).toBeNull()
  })

  it('does not count growth that a yearly season explains', () => {
    const season = monthly(18, years => 3 + Math.sin(2 * Math.PI * (years - 0.25)), 0.1)
    const trend = measured(season)
    expect(trend.season!.slopePerYear).toBeCloseTo(0, 6)
    expect(trend.season!.peakToPeak).toBeCloseTo(2, 6)
    expect(trend.activity).not.toBe('active')
  })
})

describe('Properties', () => {
  /** Widths a sum and a halving keep exact, so that ties stay ties. */
  const series = fc.array(fc.record({ day: fc.integer({ min: 0, max: 1500 }), sixtyFourths: fc.integer({ min: 0, max: 30 * 64 }) }), { minLength: 6, maxLength: 25 })
    .map(points => points.map(({ day, sixtyFourths }) => ({ takenOn: addDays('2024-01-01', day), value: sixtyFourths / 64, sigma: 0.3 })))

  it('the order readings are given in does not matter', () => {
    fc.assert(fc.property(series, (readings) => {
      const forward = markTrend(readings)
      const backward = markTrend([...readings].sort((a, b) => b.takenOn.localeCompare(a.takenOn) || a.value - b.value))
      expect(backward.activity).toBe(forward.activity)
      if (forward.kind === 'measured' && backward.kind === 'measured') expect(backward.slopePerYear).toBeCloseTo(forward.slopePerYear, 6)
    }), { numRuns: 60 })
  })

  it('a scale on the values and their error scales the slope and keeps the test', () => {
    fc.assert(fc.property(series, fc.constantFrom(2, 4, 0.5), (readings, factor) => {
      const plain = markTrend(readings)
      const scaled = markTrend(readings.map(reading => ({ ...reading, value: reading.value * factor, sigma: reading.sigma * factor })))
      if (plain.kind !== 'measured' || scaled.kind !== 'measured') return
      expect(scaled.slopePerYear).toBeCloseTo(plain.slopePerYear * factor, 6)
      expect(scaled.mannKendall.s).toBe(plain.mannKendall.s)
    }), { numRuns: 60 })
  })

  it('a turn of the sign turns slope and interval', () => {
    fc.assert(fc.property(series, (readings) => {
      const plain = markTrend(readings)
      const turned = markTrend(readings.map(reading => ({ ...reading, value: -reading.value })))
      if (plain.kind !== 'measured' || turned.kind !== 'measured') return
      expect(turned.slopePerYear).toBeCloseTo(-plain.slopePerYear, 6)
      expect(turned.interval[0]).toBeCloseTo(-plain.interval[1], 6)
      expect(turned.mannKendall.p).toBeCloseTo(plain.mannKendall.p, 10)
    }), { numRuns: 60 })
  })

  it('the slope always lies in its interval, and p between 0 and 1', () => {
    fc.assert(fc.property(series, (readings) => {
      const trend = markTrend(readings)
      if (trend.kind !== 'measured') return
      expect(trend.interval[0]).toBeLessThanOrEqual(trend.slopePerYear)
      expect(trend.interval[1]).toBeGreaterThanOrEqual(trend.slopePerYear)
      expect(trend.mannKendall.p).toBeGreaterThanOrEqual(0)
      expect(trend.mannKendall.p).toBeLessThanOrEqual(1)
    }), { numRuns: 60 })
  })
})

describe('The activity alone', () => {
  it('is the one the full trend gives', () => {
    for (const readings of [[], monthly(3, () => 1), monthly(13, years => 6 * years), monthly(14, () => 2, 0.1), monthly(7, years => 3 * years)]) {
      expect(markActivity(readings)).toBe(markTrend(readings).activity)
    }
  })
})

describe('Refusals', () => {
  const sound = monthly(8, () => 1)
  it.each([
    ['a value that is not a number', { value: Number.NaN }],
    ['an endless value', { value: Infinity }],
    ['an uncertainty of zero', { sigma: 0 }],
    ['a negative uncertainty', { sigma: -1 }],
    ['an uncertainty that is not a number', { sigma: Number.NaN }],
    ['a day that does not exist', { takenOn: '2026-02-30' }],
    ['an instant instead of a day', { takenOn: '2026-02-03T10:00:00Z' }],
    ['no day', { takenOn: '' }],
  ])('%s is refused', (_, wrong) => {
    expect(() => markTrend([...sound.slice(1), { ...sound[0]!, ...wrong }])).toThrow(RangeError)
  })
})
