import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { ItemWeightRange } from '../../../shared/types/item'
import { DENSE_CONTENTS, GOODS_DENSITIES, weightByContents, weightByGuess, weightByScale } from '../../../shared/utils/goods/goodsDensities'
import { chanceOfExceeding, inventoryTotal, type CountedWeight } from '../../../shared/utils/goods/inventoryTotal'
import { catalogueItem, ITEM_CATALOGUE, searchCatalogue } from '../../../shared/utils/goods/itemCatalogue'
import { itemWeight } from '../../../shared/utils/goods/itemWeight'
import { seeded, normalOf } from '../movement/seeded'

const box: CountedWeight = { weightSource: 'catalogue', lowLb: 31, typicalLb: 45, highLb: 58, count: 1 }
const weighed: CountedWeight = { ...weightByScale(40), count: 1 }

describe('Weight of one item', () => {
  it('is (low + 4·typical + high)/6 with a spread of (high − low)/6', () => {
    const { meanLb, sdLb } = itemWeight(box)
    expect(meanLb).toBeCloseTo((31 + 180 + 58) / 6, 12)
    expect(sdLb).toBeCloseTo(27 / 6, 12)
  })

  it('is what the scale said, within half a pound, when weighed', () => {
    expect(itemWeight(weighed)).toEqual({ meanLb: 40, sdLb: 0.5 })
  })

  it.each([
    [{ lowLb: 5, typicalLb: 4, highLb: 9 }], [{ lowLb: 1, typicalLb: 9, highLb: 8 }], [{ lowLb: -1, typicalLb: 1, highLb: 2 }],
    [{ lowLb: 0, typicalLb: Number.NaN, highLb: 2 }], [{ lowLb: 0, typicalLb: 1, highLb: Infinity }],
  ])('is refused for %o', (lb) => {
    expect(() => itemWeight({ weightSource: 'estimate', ...lb })).toThrow(RangeError)
  })
})

describe('Total of an inventory', () => {
  it('is nothing for an empty attic', () => {
    expect(inventoryTotal([])).toEqual({ itemCount: 0, typicalLb: 0, meanLb: 0, sdLb: 0, lowLb: 0, highLb: 0, weighedLb: 0, unweighedLb: 0 })
  })

  it('adds means and variances, and a shared tenth of the unweighed part', () => {
    const total = inventoryTotal([{ ...box, count: 3 }, weighed])
    const mean = 269 / 6
    expect(total.typicalLb).toBe(3 * 45 + 40)
    expect(total.meanLb).toBeCloseTo(3 * mean + 40, 10)
    expect(total.sdLb).toBeCloseTo(Math.sqrt(3 * 4.5 ** 2 + 0.25 + (0.1 * 3 * mean) ** 2), 10)
    expect(total.highLb - total.meanLb).toBeCloseTo(1.644854 * total.sdLb, 4)
    expect(total).toMatchObject({ itemCount: 4, weighedLb: 40 })
  })

  it('three of a kind in one line weigh what three lines weigh', () => {
    expect(inventoryTotal([{ ...box, count: 3 }])).toEqual(inventoryTotal([box, box, box]))
  })

  it('the shared error does not shrink with the number of items', () => {
    const share = (count: number) => {
      const { sdLb, meanLb } = inventoryTotal([{ ...box, count }])
      return sdLb / meanLb
    }
    expect(share(10)).toBeLessThan(share(1))
    expect(share(100_000)).toBeCloseTo(0.1, 3)
  })

  it('weighing narrows the band', () => {
    const estimated = inventoryTotal([{ ...box, count: 10 }])
    const scaled = inventoryTotal([{ ...weightByScale(45), count: 10 }])
    expect(scaled.highLb - scaled.lowLb).toBeLessThan((estimated.highLb - estimated.lowLb) / 5)
  })

  it.each([0, -1, 1.5, Number.NaN])('a count of %f is refused', (count) => {
    expect(() => inventoryTotal([{ ...box, count }])).toThrow(RangeError)
  })

  it('never has a low end below zero, and its band holds the mean', () => {
    const range = fc.tuple(fc.double({ min: 0, max: 200, noNaN: true }), fc.double({ min: 0, max: 200, noNaN: true }), fc.double({ min: 0, max: 200, noNaN: true }), fc.integer({ min: 1, max: 20 }))
      .map(([a, b, c, count]) => {
        const [lowLb = 0, typicalLb = 0, highLb = 0] = [a, b, c].sort((x, y) => x - y)
        return { weightSource: 'estimate' as const, lowLb, typicalLb, highLb, count }
      })
    fc.assert(fc.property(fc.array(range, { minLength: 1, maxLength: 12 }), (items) => {
      const total = inventoryTotal(items)
      expect(total.lowLb).toBeGreaterThanOrEqual(0)
      expect(total.lowLb).toBeLessThanOrEqual(total.meanLb + 1e-9)
      expect(total.highLb).toBeGreaterThanOrEqual(total.meanLb)
    }))
  })
})

describe('Chance of exceeding a limit', () => {
  const total = inventoryTotal([{ ...box, count: 10 }])

  it('is a half at the mean, 5 % at the high end and 95 % at the low end', () => {
    expect(chanceOfExceeding(total, total.meanLb)).toBeCloseTo(0.5, 6)
    expect(chanceOfExceeding(total, total.highLb)).toBeCloseTo(0.05, 5)
    expect(chanceOfExceeding(total, total.lowLb)).toBeCloseTo(0.95, 5)
  })

  it('falls as the limit rises', () => {
    const chances = [0, 200, 400, 450, 500, 900].map(limit => chanceOfExceeding(total, limit))
    chances.slice(1).forEach((chance, i) => expect(chance).toBeLessThanOrEqual(chances[i]!))
  })

  it('is certain one way or the other without uncertainty', () => {
    expect(chanceOfExceeding({ meanLb: 10, sdLb: 0 }, 9)).toBe(1)
    expect(chanceOfExceeding({ meanLb: 10, sdLb: 0 }, 10)).toBe(0)
  })

  it('agrees with drawing the items many times', () => {
    const uniform = seeded(31)
    const { meanLb, sdLb } = itemWeight(box)
    let over = 0
    const runs = 20_000
    for (let run = 0; run < runs; run++) {
      const bias = 1 + 0.1 * normalOf(uniform)
      const drawn = Array.from({ length: 10 }, () => meanLb * bias + sdLb * normalOf(uniform)).reduce((a, b) => a + b)
      if (drawn > 500) over++
    }
    expect(over / runs).toBeCloseTo(chanceOfExceeding(total, 500), 1)
    expect(Math.abs(over / runs - chanceOfExceeding(total, 500))).toBeLessThan(0.015)
  })

  it('a limit below zero or not a number is refused', () => {
    expect(() => chanceOfExceeding(total, -1)).toThrow(RangeError)
    expect(() => chanceOfExceeding(total, Number.NaN)).toThrow(RangeError)
  })
})

describe('Estimates of one’s own', () => {
  it('scale with the volume and the contents', () => {
    expect(weightByContents(3, 'books')).toEqual({ weightSource: 'estimate', lowLb: 75, typicalLb: 90, highLb: 114 })
    expect(weightByContents(2, 'mixed-household').typicalLb).toBe(14)
  })

  it('every density rises from low to high and names its source', () => {
    for (const density of Object.values(GOODS_DENSITIES)) {
      expect(density.lowLbPerFt3).toBeLessThan(density.typicalLbPerFt3)
      expect(density.typicalLbPerFt3).toBeLessThan(density.highLbPerFt3)
      expect(density.source).not.toBe('')
    }
  })

  it('what is asked about by name is denser than anything else', () => {
    const dense = DENSE_CONTENTS.map(contents => GOODS_DENSITIES[contents].typicalLbPerFt3)
    const others = Object.entries(GOODS_DENSITIES).filter(([key]) => !DENSE_CONTENTS.some(contents => contents === key))
    expect(Math.min(...dense)).toBeGreaterThan(Math.max(...others.map(([, density]) => density.typicalLbPerFt3)))
  })

  it('a guess may be half of the truth', () => {
    const range: ItemWeightRange = weightByGuess(30)
    expect(range.highLb).toBe(60)
    expect(itemWeight(range).meanLb).toBeGreaterThan(30)
  })

  it.each([0, -2, Number.NaN, Infinity])('a size or weight of %f is refused', (value) => {
    expect(() => weightByContents(value, 'books')).toThrow(RangeError)
    expect(() => weightByGuess(value)).toThrow(RangeError)
    expect(() => weightByScale(value)).toThrow(RangeError)
  })
})

describe('The catalogue', () => {
  it('has one row a key, with weights that rise and a source', () => {
    expect(new Set(ITEM_CATALOGUE.map(item => item.key)).size).toBe(ITEM_CATALOGUE.length)
    for (const item of ITEM_CATALOGUE) {
      expect(item.lowLb).toBeLessThanOrEqual(item.typicalLb)
      expect(item.typicalLb).toBeLessThanOrEqual(item.highLb)
      expect(item.lowLb).toBeGreaterThan(0)
      expect(item.source).not.toBe('')
      expect(item.key).toMatch(/^[a-z0-9-]+$/)
    }
  })

  it('is found by key and by words in any order', () => {
    expect(catalogueItem('carton-of-books')?.typicalLb).toBe(45)
    expect(catalogueItem('no-such-thing')).toBeNull()
    expect(searchCatalogue('books carton').map(item => item.key)).toEqual(['carton-of-books'])
    expect(searchCatalogue('')).toHaveLength(ITEM_CATALOGUE.length)
    expect(searchCatalogue('', 'yard').every(item => item.category === 'yard')).toBe(true)
  })
})
