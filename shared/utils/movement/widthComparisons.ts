import type { WidthComparison } from '../../types/mark'
import { readingSigma } from './readingSigma'

/** ISO/IEC 7810 ID-1 card thickness. */
export const CARD_MM = 0.76

/** US Mint coin specifications, thickness. */
export const COINS_MM = {
  dime: 1.35, cent: 1.52, quarter: 1.75, nickel: 1.95, dollar: 2.00, half: 2.15,
} as const
export type Coin = keyof typeof COINS_MM

interface WidthRange { atLeastMm: number, atMostMm: number | null }

/**
 * 'one-coin' is more than a card and up to a nickel, the thickest coin most people carry; 'two-coins' up to two of them.
 * A hair is about 0.1 mm (from memory); a finger's breadth at its tip about 12 mm (ours).
 */
export const WIDTH_RANGES: Record<WidthComparison, WidthRange> = {
  'hair': { atLeastMm: 0, atMostMm: 0.1 },
  'under-card': { atLeastMm: 0.1, atMostMm: CARD_MM },
  'card': { atLeastMm: CARD_MM, atMostMm: COINS_MM.dime },
  'one-coin': { atLeastMm: COINS_MM.dime, atMostMm: COINS_MM.nickel },
  'two-coins': { atLeastMm: COINS_MM.nickel, atMostMm: 2 * COINS_MM.nickel },
  'finger': { atLeastMm: 2 * COINS_MM.nickel, atMostMm: 12 },
  'wider': { atLeastMm: 12, atMostMm: null },
}

export interface RangeReading { widthMm: number, sigmaMm: number, atLeastMm: number, atMostMm: number | null }

/**
 * A reading from 'thicker than … thinner than …': the middle, with the spread of an even chance over the range,
 * never sharper than a coin-or-card reading. Without an upper bound the value is the lower one and the spread as coarse as a guess.
 */
export function rangeReading(atLeastMm: number, atMostMm: number | null): RangeReading {
  if (!(atLeastMm >= 0) || !Number.isFinite(atLeastMm)) throw new RangeError(`Lower bound must be zero or more: ${atLeastMm}`)
  if (atMostMm === null) {
    return { widthMm: atLeastMm, sigmaMm: Math.max(readingSigma('crack', 'guess'), atLeastMm / 4), atLeastMm, atMostMm }
  }
  if (!(atMostMm > atLeastMm) || !Number.isFinite(atMostMm)) throw new RangeError(`Upper bound must be above the lower: ${atMostMm}`)
  const spread = (atMostMm - atLeastMm) / Math.sqrt(12)
  return { widthMm: (atLeastMm + atMostMm) / 2, sigmaMm: Math.max(readingSigma('crack', 'coin-or-card'), spread), atLeastMm, atMostMm }
}

export function comparisonReading(comparison: WidthComparison): RangeReading {
  const { atLeastMm, atMostMm } = WIDTH_RANGES[comparison]
  return rangeReading(atLeastMm, atMostMm)
}
