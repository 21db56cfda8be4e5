import { describe, expect, it } from 'vitest'
import { CARD_MM, COINS_MM } from '../../../shared/utils/movement/widthComparisons'
import { widthClass } from '../../../shared/utils/movement/widthClass'

describe('BRE Digest 251 width limits', () => {
  it.each([
    [0, 0], [0.1, 0], [0.11, 1], [1, 1], [1.01, 2], [5, 2], [5.01, 3], [15, 3], [15.01, 4], [25, 4], [25.01, 5], [60, 5],
  ])('a crack of %f mm is in class %i', (widthMm, expected) => {
    expect(widthClass(widthMm).class).toBe(expected)
  })
})

describe('Things held against a crack', () => {
  it('a bank card is 0.76 mm thick (ISO/IEC 7810 ID-1)', () => {
    expect(CARD_MM).toBe(0.76)
  })

  it('coins have the thickness the US Mint specifies', () => {
    expect(COINS_MM).toEqual({ dime: 1.35, cent: 1.52, quarter: 1.75, nickel: 1.95, dollar: 2.00, half: 2.15 })
  })
})
