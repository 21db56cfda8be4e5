import type { Confidence, ItemWeightRange } from '../../types/item'

export const CONTENTS = [
  'mixed-household', 'bedding', 'clothes', 'dishes', 'toys', 'books', 'paper', 'tools', 'tile', 'liquids',
] as const
export type Contents = typeof CONTENTS[number]

export interface Density { lowLbPerFt3: number, typicalLbPerFt3: number, highLbPerFt3: number, source: string, confidence: Confidence }

/** Weight of goods as packed, by the outside volume of the box. */
export const GOODS_DENSITIES: Record<Contents, Density> = {
  'mixed-household': { lowLbPerFt3: 5, typicalLbPerFt3: 7, highLbPerFt3: 10, source: 'moving-trade constructive weight, 7 lb/ft³ (US Federal Travel Regulation 41 CFR 302-7); range from memory', confidence: 'high' },
  'bedding': { lowLbPerFt3: 3, typicalLbPerFt3: 4, highLbPerFt3: 5, source: 'from memory', confidence: 'medium' },
  'clothes': { lowLbPerFt3: 7, typicalLbPerFt3: 10, highLbPerFt3: 15.6, source: 'moving-trade pages for 70 lb packed tight in 4.5 ft³; low and typical from memory', confidence: 'medium' },
  'dishes': { lowLbPerFt3: 6.5, typicalLbPerFt3: 10, highLbPerFt3: 14, source: 'catalogue row of the dish carton over its volume', confidence: 'low' },
  'toys': { lowLbPerFt3: 4, typicalLbPerFt3: 7, highLbPerFt3: 12, source: 'from memory', confidence: 'low' },
  'books': { lowLbPerFt3: 25, typicalLbPerFt3: 30, highLbPerFt3: 38, source: 'common practice, 25–35 lb/ft³; EN 1991-1-1 Annex A, 6.0 kN/m³ for stored books (from memory) as the high value', confidence: 'medium' },
  'paper': { lowLbPerFt3: 25, typicalLbPerFt3: 33, highLbPerFt3: 58, source: 'common practice, 25–35 lb/ft³; a full case of copier paper (50 lb in 0.85 ft³) as the high value', confidence: 'medium' },
  'tools': { lowLbPerFt3: 20, typicalLbPerFt3: 30, highLbPerFt3: 45, source: 'from memory', confidence: 'low' },
  'tile': { lowLbPerFt3: 70, typicalLbPerFt3: 84, highLbPerFt3: 110, source: 'catalogue row of the tile box over its volume', confidence: 'medium' },
  'liquids': { lowLbPerFt3: 45, typicalLbPerFt3: 62.4, highLbPerFt3: 75, source: 'water 62.4 lb/ft³, a physical constant; range from memory', confidence: 'medium' },
}

/** Contents people under-estimate most: asked about by name. */
export const DENSE_CONTENTS = ['books', 'paper', 'tools', 'tile', 'liquids'] as const satisfies readonly Contents[]

export interface Carton { key: string, volumeFt3: number, lengthIn: number, widthIn: number, heightIn: number }

/** Outside sizes of the moving trade's cartons; the extra-large one from memory. */
export const CARTONS: readonly Carton[] = [
  { key: 'small', volumeFt3: 1.5, lengthIn: 16, widthIn: 12, heightIn: 12 },
  { key: 'medium', volumeFt3: 3.0, lengthIn: 18, widthIn: 18, heightIn: 16 },
  { key: 'large', volumeFt3: 4.5, lengthIn: 18, widthIn: 18, heightIn: 24 },
  { key: 'extra-large', volumeFt3: 6.0, lengthIn: 24, widthIn: 18, heightIn: 24 },
  { key: 'dishes', volumeFt3: 5.2, lengthIn: 18, widthIn: 18, heightIn: 28 },
]

/** Not things to store, but weights that calculations and cautions speak of. */
export const REFERENCE_WEIGHTS = {
  adultPersonLb: { low: 120, typical: 185, high: 300, source: 'from memory' },
  waterLbPerUsGallon: { low: 8.3, typical: 8.34, high: 8.35, source: 'physical constant, 62.4 lb/ft³' },
  householdGoodsLbPerFt3: { low: 5, typical: 7, high: 10, source: 'moving-trade rule, 7 lb/ft³: an average over whole loads' },
} as const

/** NIOSH lifting load constant, 23 kg, under ideal conditions (OSHA guidance on the NIOSH recommendations). */
export const ONE_PERSON_LIFT_LB = 51

/** Weight of a box of this outside size filled with these contents. Throws RangeError for a volume not above zero. */
export function weightByContents(volumeFt3: number, contents: Contents): ItemWeightRange {
  if (!(Number.isFinite(volumeFt3) && volumeFt3 > 0)) throw new RangeError(`Volume must be above zero: ${volumeFt3}`)
  const density = GOODS_DENSITIES[contents]
  return {
    weightSource: 'estimate',
    lowLb: volumeFt3 * density.lowLbPerFt3,
    typicalLb: volumeFt3 * density.typicalLbPerFt3,
    highLb: volumeFt3 * density.highLbPerFt3,
  }
}

/**
 * Range around a person's own guess. Large boxes are under-estimated by up to half (published), so the true weight
 * may be twice the guess; the low and typical factors are ours.
 */
export function weightByGuess(guessLb: number): ItemWeightRange {
  if (!(Number.isFinite(guessLb) && guessLb > 0)) throw new RangeError(`Guess must be above zero: ${guessLb}`)
  return { weightSource: 'estimate', lowLb: 0.8 * guessLb, typicalLb: 1.2 * guessLb, highLb: 2 * guessLb }
}

export function weightByScale(weighedLb: number): ItemWeightRange {
  if (!(Number.isFinite(weighedLb) && weighedLb > 0)) throw new RangeError(`Weight must be above zero: ${weighedLb}`)
  return { weightSource: 'weighed', lowLb: weighedLb, typicalLb: weighedLb, highLb: weighedLb }
}
