import type { CatalogueItem, ItemCategory } from '../../types/item'
import { BEDROOM_AND_LIVING } from './catalogue/bedroomAndLiving'
import { BOXES_AND_HOLIDAY } from './catalogue/boxesAndHoliday'
import { BUILDING_EQUIPMENT } from './catalogue/buildingEquipment'
import { KITCHEN_AND_OFFICE } from './catalogue/kitchenAndOffice'
import { SPORTS_AND_NURSERY } from './catalogue/sportsAndNursery'
import { TOOLS_AND_YARD } from './catalogue/toolsAndYard'

/** Things found in attics with low, typical and high weights, each with its source. Keys are stable: items refer to them. */
export const ITEM_CATALOGUE: readonly CatalogueItem[] = [
  ...BOXES_AND_HOLIDAY, ...SPORTS_AND_NURSERY, ...BEDROOM_AND_LIVING,
  ...KITCHEN_AND_OFFICE, ...TOOLS_AND_YARD, ...BUILDING_EQUIPMENT,
]

const BY_KEY = new Map(ITEM_CATALOGUE.map(item => [item.key, item]))

export function catalogueItem(key: string): CatalogueItem | null {
  return BY_KEY.get(key) ?? null
}

/** Rows whose label has every word of the text, in the catalogue's order; an empty text gives all. */
export function searchCatalogue(text: string, category: ItemCategory | null = null): CatalogueItem[] {
  const words = text.toLowerCase().split(/\s+/).filter(Boolean)
  return ITEM_CATALOGUE.filter(item =>
    (category === null || item.category === category) && words.every(word => item.label.toLowerCase().includes(word)))
}
