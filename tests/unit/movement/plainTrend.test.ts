import { describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import type { TrendReading } from '../../../shared/utils/movement/series'
import { activeFromOn, markActivity, markTrend } from '../../../shared/utils/movement/trend'
import { plainTrend } from './plainTrend'
import { normalOf, seeded } from './seeded'

const uniform = seeded(41)
const oneOf = <T>(list: readonly T[]) => list[Math.floor(uniform() * list.length)]!

/** Series of every shape the program meets: uneven days, same-day readings, ties by rounding, mixed methods, growth and season. */
function inventSeries(): TrendReading[] {
  const count = 1 + Math.floor(uniform() * 40)
  const [perYear, season, step, rounding] = [oneOf([0, 0, 1, 2, 4, 8, -2]), oneOf([0, 1, 2]), oneOf([9, 30.4, 30.4]), oneOf([0, 0, 1, 0.5])]
  const phase = uniform() * 6.28
  return Array.from({ length: count }, (_, k) => {
    const day = Math.floor(k * step + uniform() * oneOf([0, 25]))
    const value = 3 + perYear * day / 365.25 + season / 2 * Math.sin(2 * Math.PI * day / 365.25 + phase) + 0.25 * normalOf(uniform) + (uniform() < 0.03 ? 4 : 0)
    return { takenOn: addDays('2024-01-01', day), value: Math.max(0, rounding ? Math.round(value / rounding) * rounding : value), sigma: oneOf([0.1, 0.25, 0.5]) }
  })
}

const series = Array.from({ length: 400 }, inventSeries)

describe('The trend against the same rules written out plainly, on 400 random series', () => {
  it('gives the same slope, interval and test', () => {
    let compared = 0
    for (const readings of series) {
      const trend = markTrend(readings)
      const plain = plainTrend(readings)
      if (!plain) {
        expect(trend.mannKendall).toBeNull()
        continue
      }
      expect(trend.mannKendall).toMatchObject({ s: plain.s, varS: expect.closeTo(plain.varS, 9), z: expect.closeTo(plain.z, 9), p: expect.closeTo(plain.p, 5) })
      if (trend.kind !== 'measured') continue
      compared++
      expect(trend.slopePerYear).toBeCloseTo(plain.slope, 8)
      expect(trend.interval[0]).toBeCloseTo(plain.interval[0], 8)
      expect(trend.interval[1]).toBeCloseTo(plain.interval[1], 8)
      expect(trend.season === null).toBe(plain.seasonSlopeAtLeast === null)
      if (trend.season) expect(trend.season.slopeAtLeast).toBeCloseTo(plain.seasonSlopeAtLeast!, 3)
    }
    expect(compared).toBeGreaterThan(150)
  })

  it('gives the same activity and the same sudden rises', () => {
    const met = new Set<string>()
    for (const readings of series) {
      const trend = markTrend(readings)
      const plain = plainTrend(readings)
      met.add(trend.activity)
      expect(trend.activity).toBe(plain?.activity ?? 'too-few-readings')
      if (plain) expect(trend.suddenRises.map(rise => rise.takenOn)).toEqual(plain.rises)
    }
    expect([...met].sort()).toEqual(['active', 'dormant', 'too-few-readings', 'watch'])
  })

  it('was active since the day that judging each reading on its own day says', () => {
    let walked = 0
    for (const readings of series) {
      const days = [...new Set(readings.map(reading => reading.takenOn))].sort()
      const activeOn = days.map(on => markActivity(readings.filter(reading => reading.takenOn <= on)) === 'active')
      const first = activeOn.indexOf(true)
      expect(activeFromOn(readings)).toBe(first === -1 ? null : days[first])
      const trend = markTrend(readings)
      if (trend.kind !== 'measured' || trend.activity !== 'active') continue
      walked++
      expect(trend.activeSince).toBe(days[activeOn.lastIndexOf(false) + 1])
    }
    expect(walked).toBeGreaterThan(40)
  })
})
