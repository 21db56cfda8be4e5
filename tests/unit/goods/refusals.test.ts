import { describe, expect, it } from 'vitest'
import { pressurePsf, suggestFootprint } from '../../../shared/utils/goods/footprint'
import { catalogueItem, ITEM_CATALOGUE } from '../../../shared/utils/goods/itemCatalogue'
import { refusalsFor, type RefusalInput } from '../../../shared/utils/goods/refusals'

const light: RefusalInput = { catalogueKey: null, label: 'Bedding', count: 1, typicalLb: 12, lengthFt: 2, widthFt: 2, heightFt: 2 }

function fromCatalogue(key: string): RefusalInput {
  const item = catalogueItem(key)!
  return { catalogueKey: key, label: item.label, count: 1, typicalLb: item.typicalLb, lengthFt: 2, widthFt: 2, heightFt: null }
}

describe('What should never go up', () => {
  it.each([
    'water-heater-40-gal-full', 'water-heater-50-gal-full', 'water-heater-80-gal-full', 'drain-pan-30-x-60-x-2-in-full-of-water', 'piano-spinet',
    'bag-of-cement-or-concrete-mix-80-lb', 'ceramic-tile-box-for-10-ft2', 'plastic-tote-27-gal-full-of-books', 'paint-1-us-gal-latex-can',
  ])('%s is refused, and is a row of the catalogue', (key) => {
    expect(refusalsFor(fromCatalogue(key), null)[0]!.level).toBe('refuse')
  })

  it.each(['fish-tank-empty', 'air-handler-or-attic-furnace', 'asphalt-shingle-bundle', 'water-heater-40-gal-empty', 'hardwood-flooring-bundle-for-20-ft2'])('%s is asked about', (key) => {
    expect(refusalsFor(fromCatalogue(key), null)[0]!.level).toBe('question')
  })

  it('nothing speaks against a light box', () => {
    expect(refusalsFor(light, 20)).toEqual([])
    expect(refusalsFor(fromCatalogue('ornament-box'), null)).toEqual([])
  })
})

describe('What has to be asked', () => {
  it.each([
    ['Water bed', 'holds-water'], ['Gun safe', 'too-heavy-for-any-attic'], ['Two car engines', 'too-heavy-for-any-attic'], ['Spare tiles', 'building-material'],
    ['Old books', 'dense-by-name'], ['Propane bottle', 'can-burn'], ['Tax documents', 'dense-by-name'], ['Toolbox with tools', 'dense-by-name'],
  ])('a label of one’s own like “%s”', (label, reason) => {
    expect(refusalsFor({ ...light, label }, null)).toContainEqual({ level: 'question', reason })
  })

  it('a label that only looks like it is left alone', () => {
    expect(refusalsFor({ ...light, label: 'Safety gate and engineering notebook cover' }, null)).toEqual([])
  })

  it('more than one person should lift: over 51 lb (NIOSH)', () => {
    expect(refusalsFor({ ...light, typicalLb: 51 }, null)).toEqual([])
    expect(refusalsFor({ ...light, typicalLb: 52 }, null)).toEqual([{ level: 'question', reason: 'over-one-person-lift' }])
  })

  it('as dense as packed books', () => {
    expect(refusalsFor({ ...light, typicalLb: 25, lengthFt: 1, widthFt: 1, heightFt: 1 }, null)).toEqual([{ level: 'question', reason: 'dense' }])
    expect(refusalsFor({ ...light, typicalLb: 25, lengthFt: 1, widthFt: 1, heightFt: null }, null)).toEqual([])
  })

  it('a pile that presses more than the rating, though each piece is light', () => {
    expect(refusalsFor({ ...light, count: 7 }, 20)).toEqual([{ level: 'question', reason: 'presses-more-than-rated' }])
    expect(refusalsFor({ ...light, count: 6 }, 20)).toEqual([])
  })
})

describe('Footprints', () => {
  it('a book carton is 16 × 12 in', () => {
    expect(suggestFootprint(catalogueItem('carton-of-books')!)).toMatchObject({ basis: 'carton', widthFt: 1 })
    expect(suggestFootprint(catalogueItem('carton-of-books')!).lengthFt).toBeCloseTo(16 / 12, 12)
  })

  it('every row gets one, and a volume keeps its volume', () => {
    for (const item of ITEM_CATALOGUE) {
      const { lengthFt, widthFt, heightFt, basis } = suggestFootprint(item)
      expect(lengthFt * widthFt * heightFt).toBeGreaterThan(0)
      if (basis === 'volume') expect(lengthFt * widthFt * heightFt).toBeCloseTo(item.volumeFt3!, 8)
      if (basis === 'unknown') expect(item.volumeFt3).toBeNull()
    }
  })

  it('pressure is weight over area, and needs an area', () => {
    expect(pressurePsf(80, 2, 2)).toBe(20)
    expect(() => pressurePsf(80, 0, 2)).toThrow(RangeError)
    expect(() => pressurePsf(80, 2, Number.NaN)).toThrow(RangeError)
  })
})
