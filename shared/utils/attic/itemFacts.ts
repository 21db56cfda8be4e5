import type { ItemFacts } from '../../schemas/atticItem'
import type { StoredItem } from '../../types/item'
import { ITEM_OWNER_WORDS } from '../messages/goodsMessages'
import { formatLength, formatWeight, type UnitSystem } from '../units'

/** The part of a stored item that a person may change. */
export const itemFacts = ({ name, catalogueKey, category, quantity, lowLb, typicalLb, highLb, weightSource, belongsTo, fieldNumber, xFt, yFt, lengthFt, widthFt, heightFt, notes, keptDespite }: StoredItem): ItemFacts =>
  ({ name, catalogueKey, category, quantity, lowLb, typicalLb, highLb, weightSource, belongsTo, fieldNumber, xFt, yFt, lengthFt, widthFt, heightFt, notes, keptDespite, photoIds: [] })

/** Mine and theirs side by side, in words. */
export function clashRows(mine: ItemFacts, theirs: ItemFacts, system: UnitSystem = 'us') {
  const length = (ft: number | null) => ft === null ? '' : formatLength(ft, system)
  const row = (field: string, label: string, shown: (item: ItemFacts) => string) => ({ field, label, mine: shown(mine), theirs: shown(theirs) })
  return [
    row('name', 'What is it?', item => item.name),
    row('quantity', 'How many?', item => String(item.quantity)),
    row('typicalLb', 'Weight of one', item => formatWeight(item.typicalLb, system)),
    row('size', 'Size of the pile', item => [item.lengthFt, item.widthFt, item.heightFt].map(length).filter(Boolean).join(' × ')),
    row('xFt', 'From the left wall', item => length(item.xFt)),
    row('yFt', 'From joist 1', item => length(item.yFt)),
    row('belongsTo', 'Whose is it?', item => ITEM_OWNER_WORDS[item.belongsTo]),
    row('notes', 'Notes', item => item.notes),
  ]
}
