import type { CatalogueItem, Confidence, ItemCategory } from '../../../types/item'

/** Sources that many rows share. */
export const DOD = 'US DoD household goods weight list (public domain) for the typical value; low and high are judgement'
export const CARTON = 'moving-trade carton volume; weight from memory'
export const MEMORY = 'from memory'

type RowExtra = Partial<Pick<CatalogueItem, 'note' | 'per' | 'volumeFrom'>>

/** One row: [low, typical, high] in lb, volume in ft³ or null where the source has none. */
export function row(
  key: string, label: string, category: ItemCategory, lb: readonly [number, number, number],
  volumeFt3: number | null, source: string, confidence: Confidence, extra: RowExtra = {},
): CatalogueItem {
  const [lowLb, typicalLb, highLb] = lb
  return { key, label, category, lowLb, typicalLb, highLb, volumeFt3, source, confidence, note: null, per: 'each', volumeFrom: 'size', ...extra }
}
