import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { dayFromNumber, dayNumber, isDay } from '../../../shared/utils/days'
import { selectMedian, selectRank } from '../../../shared/utils/movement/selectRank'

const lists = fc.array(fc.oneof(fc.double({ noNaN: true }).map(value => value + 0), fc.integer({ min: 0, max: 3 })), { minLength: 1, maxLength: 60 })

describe('The value at a rank', () => {
  it('is the one a sort puts there, ties and endless values included', () => {
    fc.assert(fc.property(lists, fc.nat(), (list, n) => {
      const index = n % list.length
      expect(selectRank(new Float64Array(list), list.length, index)).toBe(new Float64Array(list).sort()[index])
    }), { numRuns: 400, examples: [[[1, 1, 1, 1], 2], [[3, 2, 1], 0], [[5], 0]] })
  })

  it('looks at the first so many only', () => {
    expect(selectRank(new Float64Array([5, 4, 3, -9, -9]), 3, 0)).toBe(3)
  })

  it('gives the median, between the two middle ones for an even number', () => {
    expect([selectMedian(new Float64Array([3, 1, 2]), 3), selectMedian(new Float64Array([4, 1, 3, 2]), 4), selectMedian(new Float64Array([2, 1]), 2)]).toEqual([2, 2.5, 1.5])
  })
})

describe('Days counted without a clock', () => {
  it('are the calendar’s, from year 1 to 9999', () => {
    fc.assert(fc.property(fc.integer({ min: -719_162, max: 2_932_896 }), (day) => {
      expect(dayNumber(dayFromNumber(day))).toBe(day)
    }), { numRuns: 2000 })
  })

  it.each(['2026-02-29', '1900-02-29', '2026-13-01', '2026-00-10', '2026-01-00', '2026-04-31', '2026-1-1', '2026-01-01T00:00:00Z', ''])('%j is no day', (text) => {
    expect(isDay(text)).toBe(false)
  })

  it.each(['2024-02-29', '2000-02-29', '1970-01-01', '9999-12-31'])('%s is one', (text) => {
    expect(isDay(text)).toBe(true)
    expect(dayFromNumber(dayNumber(text))).toBe(text)
  })
})
