import { describe, expect, it } from 'vitest'
import { cameraDayApart, phoneDayApart, sizeQuestion } from '../../../components/ceiling/readingQuestions'
import type { ReadingRow } from '../../../shared/types/markPage'

const readings = [1.1, 1.2, 1.3].map((value, i) => ({ value, segment: 1, takenOn: `2027-01-0${i + 1}` })) as ReadingRow[]

describe('a number that is asked about', () => {
  it('is 12 where it was 1.2, with what was probably meant', () => {
    expect(sizeQuestion('crack', 12, readings, 1)).toEqual({ value: 12, usual: 1.2, meant: 1.2 })
  })

  it('has no likely meaning when a tenth of it would be as odd, or bumps were counted', () => {
    expect(sizeQuestion('crack', 140, readings, 1)?.meant).toBeNull()
    expect(sizeQuestion('nail-pops', 30, [{ value: 3, segment: 1 }] as ReadingRow[], 1)).toMatchObject({ usual: 3, meant: null })
  })

  it('is not asked about without readings of this segment, or when it is like them', () => {
    expect([sizeQuestion('crack', 12, readings, 2), sizeQuestion('crack', 1.5, readings, 1), sizeQuestion('crack', null, readings, 1), sizeQuestion('crack', Number.NaN, readings, 1)]).toEqual([null, null, null, null])
  })
})

describe('clocks that disagree', () => {
  it('a camera more than a day off is asked about', () => {
    expect(cameraDayApart(['2027-03-13 23:59:00', null], '2027-03-14')).toBeNull()
    expect(cameraDayApart([null, '2019-01-01 00:00:00 +02:00'], '2027-03-14')).toBe('2019-01-01')
  })

  it('a phone more than a day off is told', () => {
    expect(phoneDayApart(new Date(2027, 2, 15, 1), '2027-03-14')).toBeNull()
    expect(phoneDayApart(new Date(2025, 0, 2, 12), '2027-03-14')).toBe('2025-01-02')
  })
})
