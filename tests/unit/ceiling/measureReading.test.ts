import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { METHODS_BY_KIND, MARK_KINDS, NOTHING_ASKED, WIDTH_COMPARISONS, type MarkKind, type ObservationAnswers } from '../../../shared/types/mark'
import { firstReading, measureReading, MOST_VALUE } from '../../../shared/utils/movement/measureReading'
import { readingSigma } from '../../../shared/utils/movement/readingSigma'
import { WIDTH_RANGES } from '../../../shared/utils/movement/widthComparisons'

const given = (method: Parameters<typeof measureReading>[1]['method'], value: number | null, atLeast: number | null = null, atMost: number | null = null) => ({ method, value, atLeast, atMost })
const answers = (more: Partial<ObservationAnswers> & { kind: MarkKind }): ObservationAnswers => ({ ...NOTHING_ASKED, roomId: 'room', ...more })

describe('measureReading', () => {
  it('gives every suitable method its own standard uncertainty', () => {
    for (const kind of MARK_KINDS) {
      for (const method of METHODS_BY_KIND[kind]) expect(measureReading(kind, given(method, 2))).toEqual({ kind: 'measured', method, value: 2, sigma: readingSigma(kind, method), low: null, high: null })
    }
  })

  it('refuses a method that does not suit, a missing or unsound value and half a bump', () => {
    expect(measureReading('nail-pops', given('ruler', 1))).toEqual({ kind: 'refused', field: 'method', why: 'method-does-not-suit' })
    expect(measureReading('crack', given('ruler', null))).toMatchObject({ why: 'value-missing' })
    for (const value of [-0.1, MOST_VALUE.crack + 0.1, Number.NaN, Infinity]) expect(measureReading('crack', given('ruler', value))).toMatchObject({ why: 'value-out-of-range' })
    expect(measureReading('nail-pops', given('count', 2.5))).toMatchObject({ why: 'count-not-whole' })
  })

  it('takes a range from coins and cards on a crack only, the right way round', () => {
    expect(measureReading('crack', given('coin-or-card', null, 1.35, 1.95))).toMatchObject({ low: 1.35, high: 1.95 })
    expect(measureReading('crack', given('ruler', null, 1, 2))).toMatchObject({ why: 'range-not-here' })
    expect(measureReading('sag', given('ruler', null, 1, 2))).toMatchObject({ why: 'range-not-here' })
    expect(measureReading('crack', given('coin-or-card', null, 2, 1))).toMatchObject({ field: 'atMost', why: 'range-upside-down' })
    expect(measureReading('crack', given('coin-or-card', null, 301))).toMatchObject({ field: 'atLeast', why: 'value-out-of-range' })
  })

  it('holds its value inside any sound range, and is never surer than a coin can be', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 100, noNaN: true }), fc.double({ min: 0.01, max: 100, noNaN: true }), (low, width) => {
      const measured = measureReading('crack', given('coin-or-card', null, low, low + width))
      return measured.kind === 'measured' && measured.value >= low && measured.value <= low + width && measured.sigma >= readingSigma('crack', 'coin-or-card')
    }))
  })
})

describe('firstReading', () => {
  it('has no answer when no size was given', () => {
    for (const kind of MARK_KINDS) expect(firstReading(answers({ kind }))).toBeNull()
  })

  it('takes the measured number before the comparison', () => {
    expect(firstReading(answers({ kind: 'crack', widthMm: 2, widthMethod: 'ruler', widthComparison: 'hair' }))).toMatchObject({ value: 2, method: 'ruler' })
    expect(firstReading(answers({ kind: 'crack', widthMm: 0, widthComparison: 'wider' }))).toMatchObject({ value: 0, method: 'guess' })
  })

  it('turns each comparison into its range', () => {
    for (const widthComparison of WIDTH_COMPARISONS) {
      expect(firstReading(answers({ kind: 'crack', widthComparison }))).toMatchObject({ kind: 'measured', low: WIDTH_RANGES[widthComparison].atLeastMm, high: WIDTH_RANGES[widthComparison].atMostMm })
    }
  })

  it('reads counts, drops and stains from their own answers, and falls back when the width method does not suit', () => {
    expect(firstReading(answers({ kind: 'nail-pops', popCount: 0, widthMm: 9 }))).toMatchObject({ value: 0, method: 'count' })
    expect(firstReading(answers({ kind: 'sag', sagDropMm: 12, widthMethod: 'coin-or-card' }))).toMatchObject({ value: 12, method: 'guess', sigma: readingSigma('sag', 'guess') })
    expect(firstReading(answers({ kind: 'stain', stainSizeMm: 200, widthMethod: 'ruler' }))).toMatchObject({ value: 200, method: 'ruler' })
  })
})
