import { describe, expect, it } from 'vitest'
import { markTrend } from '../../../shared/utils/movement/trend'
import { HABITS, inventMark, SIGMA_MM, shareEverActive, type InventedMovement } from './inventedMarks'
import { normalOf, readingsOn, seeded } from './seeded'

/** The activity rule is ours, so its errors are measured here: a look at every monthly reading, σ 0.25 mm, fixed seeds. */
const SERIES = 1000
/** The reading of month 14 is the fifteenth. */
const share = (movement: InventedMovement, lastMonth: number, seed: number) => shareEverActive(movement, { months: lastMonth + 1, series: SERIES, seed })

describe('The activity rule on 1,000 invented series each', () => {
  it('ever calls at most 3 % of marks that do not move active, in 24 looks', () => {
    expect(share({ perYear: 0, seasonPeakToPeak: 0 }, 23, 11)).toBeLessThanOrEqual(0.03)
  })

  it('ever calls at most 3 % of marks with a 1 mm season of random phase and no growth active, in 24 looks', () => {
    expect(share({ perYear: 0, seasonPeakToPeak: 1 }, 23, 12)).toBeLessThanOrEqual(0.03)
  })

  it('holds both also when the 24 looks only begin once there are enough readings', () => {
    expect(share({ perYear: 0, seasonPeakToPeak: 0 }, 28, 16)).toBeLessThanOrEqual(0.03)
    expect(share({ perYear: 0, seasonPeakToPeak: 1 }, 28, 17)).toBeLessThanOrEqual(0.03)
  })

  it('calls at least 95 % of marks that grow 2 mm a year on a 1 mm season active by month 14', () => {
    expect(share({ perYear: 2, seasonPeakToPeak: 1 }, 14, 13)).toBeGreaterThanOrEqual(0.95)
  })

  it('calls at least 95 % of marks that grow 6 mm a year on a 1 mm season active by month 8', () => {
    expect(share({ perYear: 6, seasonPeakToPeak: 1 }, 8, 14)).toBeGreaterThanOrEqual(0.95)
  })

  it('never calls a mark that closes 3 mm a year active', () => {
    expect(share({ perYear: -3, seasonPeakToPeak: 1 }, 23, 15)).toBe(0)
  })

  it('keeps finding growth of 6 mm a year in four of five however carelessly it is read', () => {
    for (const habit of Object.values(HABITS)) {
      expect(shareEverActive({ perYear: 6, seasonPeakToPeak: 1 }, { months: 9, series: 500, seed: 18, habit })).toBeGreaterThanOrEqual(0.8)
    }
  })
})

describe('The sudden alert on invented series', () => {
  it('is raised by every 3 mm jump at the very next reading, after any number of readings from one', () => {
    const uniform = seeded(21)
    for (let n = 0; n < SERIES; n++) {
      const before = 1 + Math.floor(uniform() * 24)
      const values = Array.from({ length: before + 1 }, (_, i) => 3 + (i === before ? 3 : 0) + SIGMA_MM * normalOf(uniform))
      const trend = markTrend(readingsOn(values.map((_, i) => i * 30), values, SIGMA_MM))
      expect(trend.sudden).toMatchObject({ takenOn: trend.suddenRises.at(-1)!.takenOn, value: values.at(-1) })
    }
  })

  it('is raised by fewer than 3 % of quiet series in 24 readings', () => {
    const uniform = seeded(22)
    const alarmed = Array.from({ length: SERIES }, () => markTrend(inventMark({ perYear: 0, seasonPeakToPeak: 0 }, 24, uniform)))
      .filter(trend => trend.suddenRises.length > 0).length
    expect(alarmed / SERIES).toBeLessThan(0.03)
  })
})
