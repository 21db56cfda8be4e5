import { describe, expect, it } from 'vitest'
import { refusedReadingSentence, askAgainSentence, readingRangeWords } from '../../../shared/utils/messages/readingMessages'
import { valueToAskAgain } from '../../../shared/utils/movement/askAgain'

describe('valueToAskAgain', () => {
  it('asks about a lost decimal point, up or down', () => {
    expect(valueToAskAgain('crack', 12, [1.2])).toBe(1.2)
    expect(valueToAskAgain('crack', 1.2, [12, 12.5, 12])).toBe(12)
    expect(valueToAskAgain('nail-pops', 40, [4])).toBe(4)
  })

  it('does not ask at the first reading, nor about small or likely changes', () => {
    expect(valueToAskAgain('crack', 12, [])).toBeNull()
    expect(valueToAskAgain('crack', 2, [0.3])).toBeNull()
    expect(valueToAskAgain('crack', 9, [4])).toBeNull()
    expect(valueToAskAgain('nail-pops', 12, [3])).toBeNull()
  })

  it('compares with the newest three', () => {
    expect(valueToAskAgain('crack', 12, [12, 1, 1.1, 1.2])).toBe(1.1)
    expect(valueToAskAgain('crack', 12, [1, 11, 12, 11])).toBeNull()
  })
})

describe('the words', () => {
  it('name both numbers with their unit, and a range by its ends', () => {
    expect(askAgainSentence('crack', 12, 1.2, 'metric')).toMatch(/12\s?mm.*1\.2\s?mm/)
    expect(readingRangeWords('crack', { value: 1.05, low: 0.76, high: 1.35 })).toMatch(/between 0.76 and 1.35\smm/)
    expect(readingRangeWords('crack', { value: 12, low: 12, high: null }, 'metric')).toMatch(/more than 12\smm/)
    expect(readingRangeWords('nail-pops', { value: 3, low: null, high: null })).toMatch(/3\spops/)
  })

  it('say what to do about each refusal', () => {
    for (const why of ['method-does-not-suit', 'value-missing', 'value-out-of-range', 'count-not-whole', 'range-not-here', 'range-upside-down'] as const) expect(refusedReadingSentence('crack', why)).toMatch(/\.$/)
  })
})
