import { describe, expect, it } from 'vitest'
import { markActivity, markTrend } from '../../../shared/utils/movement/trend'
import { inventedReadings, normalOf, readingsOn, seeded, type InventedMark } from './seeded'

/** The activity rule is ours, so its errors are measured here: series with a look at every monthly reading, σ 0.25 mm. */
const SERIES = 500
const SIGMA = 0.25
const FIRST_LOOK = 6

function everActive(mark: InventedMark, uniform: () => number): boolean {
  const readings = inventedReadings(mark, uniform)
  for (let look = FIRST_LOOK; look <= readings.length; look++) {
    if (markActivity(readings.slice(0, look)) === 'active') return true
  }
  return false
}

/** Share of series called active at any of the looks in so many months (the first reading is month 0). */
function shareActive(perYear: number, seasonPeakToPeak: number, months: number, seed: number): number {
  const uniform = seeded(seed)
  const mark = { perYear, seasonPeakToPeak, months, sigma: SIGMA }
  return Array.from({ length: SERIES }, () => everActive(mark, uniform)).filter(Boolean).length / SERIES
}

describe('The activity rule on invented series', () => {
  it('calls at most 3 % of marks that do not move active in 24 looks', () => {
    expect(shareActive(0, 0, 24, 11)).toBeLessThanOrEqual(0.03)
  })

  it('calls at most 3 % of marks with a 1 mm season and no growth active in 24 looks', () => {
    expect(shareActive(0, 1, 24, 12)).toBeLessThanOrEqual(0.03)
  })

  it('calls at least 95 % of marks that grow 2 mm a year under a 1 mm season active by month 14', () => {
    expect(shareActive(2, 1, 15, 13)).toBeGreaterThanOrEqual(0.95)
  })

  it('calls at least 95 % of marks that grow 6 mm a year active by month 8', () => {
    expect(shareActive(6, 0, 9, 14)).toBeGreaterThanOrEqual(0.95)
  })

  it('never calls a mark that closes active', () => {
    expect(shareActive(-3, 1, 24, 15)).toBe(0)
  })
})

describe('The sudden alert on invented series', () => {
  it('is raised by every 3 mm jump, after any number of readings from one', () => {
    const uniform = seeded(21)
    for (let n = 0; n < SERIES; n++) {
      const before = 1 + Math.floor(uniform() * 12)
      const values = Array.from({ length: before + 1 }, (_, i) => 2 + (i === before ? 3 : 0) + SIGMA * Math.min(2, Math.max(-2, normalOf(uniform))))
      const trend = markTrend(readingsOn(values.map((_, i) => i * 30), values, SIGMA))
      expect(trend.sudden).not.toBeNull()
    }
  })

  it('is raised by fewer than 3 % of quiet series in 24 readings', () => {
    const uniform = seeded(22)
    const alarmed = Array.from({ length: SERIES }, () => markTrend(inventedReadings({ perYear: 0, seasonPeakToPeak: 0, months: 24, sigma: SIGMA }, uniform)))
      .filter(trend => trend.suddenRises.length > 0).length
    expect(alarmed / SERIES).toBeLessThan(0.03)
  })
})
