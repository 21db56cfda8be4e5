export const ITEM_CATEGORIES = [
  'boxes', 'holiday', 'sports-and-travel', 'nursery', 'bedroom', 'living-room', 'dining-and-kitchen',
  'appliances', 'office', 'tools', 'yard', 'building-equipment', 'other',
] as const
export type ItemCategory = typeof ITEM_CATEGORIES[number]

/** catalogue: from the table of typical weights; estimate: size times contents, or a person's own range; weighed: on a scale. */
export const WEIGHT_SOURCES = ['catalogue', 'estimate', 'weighed'] as const
export type WeightSource = typeof WEIGHT_SOURCES[number]

export const ITEM_OWNERS = ['landlord', 'tenant'] as const
export type ItemOwner = typeof ITEM_OWNERS[number]

export const CONFIDENCES = ['high', 'medium', 'low'] as const
export type Confidence = typeof CONFIDENCES[number]

/** Weight of one piece. A weighed item has all three equal. */
export interface ItemWeightRange { weightSource: WeightSource, lowLb: number, typicalLb: number, highLb: number }

/** Where a pile stands in its field: x along the joists from one bearing wall, y across them. Null until placed. */
export interface ItemPlacement { fieldId: string, xFt: number, yFt: number }

export interface AtticItem extends ItemWeightRange {
  id: string
  atticId: string
  /** Key of the catalogue row; null for a custom item. */
  catalogueKey: string | null
  label: string
  category: ItemCategory
  count: number
  /** Footprint of the whole pile: length along the joists, width across them. */
  lengthFt: number
  widthFt: number
  heightFt: number | null
  placement: ItemPlacement | null
  owner: ItemOwner
  addedOn: string
  removedOn: string | null
  note: string | null
}

/** A stored item as its row stands: weights of one piece, footprint of the whole pile. */
export interface StoredItem {
  id: string
  version: number
  fieldNumber: number
  catalogueKey: string | null
  name: string
  category: ItemCategory
  quantity: number
  lowLb: number
  typicalLb: number
  highLb: number
  weightSource: WeightSource
  belongsTo: ItemOwner
  xFt: number
  yFt: number
  lengthFt: number
  widthFt: number
  heightFt: number | null
  placedOn: string
  removedOn: string | null
  notes: string
  /** Why it stays up though it should not; empty for what nothing speaks against. */
  keptDespite: string
}

/** What judging, drawing and listing read of a stored item. */
export type ContentsItem = Pick<StoredItem, 'id' | 'fieldNumber' | 'quantity' | 'lowLb' | 'typicalLb' | 'highLb' | 'weightSource' | 'xFt' | 'yFt' | 'lengthFt' | 'widthFt'>
export type NamedContentsItem = ContentsItem & Pick<StoredItem, 'name'>

/** One row of the catalogue of typical weights. */
export interface CatalogueItem {
  key: string
  label: string
  category: ItemCategory
  lowLb: number
  typicalLb: number
  highLb: number
  volumeFt3: number | null
  /** 'mover-rule': typical weight over 7 lb/ft³, as the source's own figures are made. */
  volumeFrom: 'size' | 'mover-rule'
  source: string
  confidence: Confidence
  note: string | null
  /** What one piece is. */
  per: 'each' | 'square-foot' | 'linear-foot'
}
