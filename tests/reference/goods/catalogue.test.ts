import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { CARTONS, GOODS_DENSITIES, REFERENCE_WEIGHTS } from '../../../shared/utils/goods/goodsDensities'
import { pressurePsf } from '../../../shared/utils/goods/footprint'
import { ITEM_CATALOGUE } from '../../../shared/utils/goods/itemCatalogue'

/** Sources of each weight stand in the table's own rows; this copy holds the figures it was taken from. */
function publishedRows(): { name: string, category: string, lb: number[], volumeFt3: number | null }[] {
  const text = readFileSync(new URL('../data/item-weights.csv', import.meta.url), 'utf8')
  return text.trim().split('\n').slice(1).map((line) => {
    const cells = [...line.matchAll(/("[^"]*"|[^,]*)(,|$)/g)].map(match => match[1]!.replaceAll('"', ''))
    const [name = '', category = '', low, typical, high, volume] = cells
    return {
      name, category: category.replace(' & ', '-and-').replace(' ', '-'),
      lb: [low, typical, high].map(Number), volumeFt3: volume ? Number(volume) : null,
    }
  })
}

describe('The catalogue of weights', () => {
  const rows = publishedRows()
  const stored = rows.filter(row => row.category !== 'live-load' && row.category !== 'reference')

  it('has every row of the collected table, figure for figure', () => {
    expect(stored).toHaveLength(163)
    for (const category of new Set(stored.map(row => row.category))) {
      const figures = ITEM_CATALOGUE.filter(item => item.category === category)
        .map(item => ({ lb: [item.lowLb, item.typicalLb, item.highLb], volumeFt3: item.volumeFt3 }))
      expect(figures).toEqual(stored.filter(row => row.category === category).map(({ lb, volumeFt3 }) => ({ lb, volumeFt3 })))
    }
    expect(ITEM_CATALOGUE).toHaveLength(stored.length)
  })

  it('keeps the rows that are no goods as reference weights', () => {
    const figures = rows.filter(row => !stored.includes(row)).map(row => row.lb)
    const kept = Object.values(REFERENCE_WEIGHTS).map(({ low, typical, high }) => [low, typical, high])
    expect(kept).toEqual(figures)
  })

  it('derives volumes marked so from the mover’s rule of 7 lb/ft³ (US Federal Travel Regulation 41 CFR 302-7)', () => {
    const derived = ITEM_CATALOGUE.filter(item => item.volumeFrom === 'mover-rule')
    expect(derived.length).toBeGreaterThan(80)
    const off = derived.filter(item => Math.abs(item.typicalLb / item.volumeFt3! - 7) > 0.01).map(item => item.key)
    expect(off).toEqual([])
  })
})

describe('Moving-trade and floor-pressure figures', () => {
  it('cartons hold the volume their outside size gives', () => {
    for (const { lengthIn, widthIn, heightIn, volumeFt3 } of CARTONS) {
      expect(Math.abs(lengthIn * widthIn * heightIn / 1728 - volumeFt3)).toBeLessThan(0.2)
    }
  })

  it.each([
    ['small', 65, 48.8], ['small', 51, 38.2], ['medium', 51, 22.7], ['medium', 21, 9.3], ['large', 31.5, 14.0], ['large', 70, 31.1],
  ])('a %s carton of %f lb presses %f psf (computed table)', (key, lb, psf) => {
    const carton = CARTONS.find(entry => entry.key === key)!
    expect(pressurePsf(lb, carton.lengthIn / 12, carton.widthIn / 12)).toBeCloseTo(psf, 0)
  })

  it.each([[10, 1.43], [20, 2.86], [30, 4.29]])('average goods reach %i psf at a height of %f ft', (psf, heightFt) => {
    expect(psf / GOODS_DENSITIES['mixed-household'].typicalLbPerFt3).toBeCloseTo(heightFt, 2)
  })

  it('books stored are 38 lb/ft³ at most: EN 1991-1-1 Annex A, 6.0 kN/m³ (from memory)', () => {
    expect(GOODS_DENSITIES.books.highLbPerFt3).toBeCloseTo(6.0 / 0.157087, 0)
  })

  it('water weighs 62.4 lb/ft³ and 8.34 lb a gallon (231 in³)', () => {
    expect(GOODS_DENSITIES.liquids.typicalLbPerFt3 * 231 / 1728).toBeCloseTo(REFERENCE_WEIGHTS.waterLbPerUsGallon.typical, 2)
  })
})
