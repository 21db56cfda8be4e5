import type { AtticItem } from '../../types/item'
import { pressurePsf } from './footprint'
import { ONE_PERSON_LIFT_LB, type DENSE_CONTENTS } from './goodsDensities'

export const REFUSAL_REASONS = [
  'holds-water', 'too-heavy-for-any-attic', 'can-burn', 'building-material', 'part-of-the-building',
  'dense-by-name', 'over-one-person-lift', 'dense', 'presses-more-than-rated',
] as const
export type RefusalReason = typeof REFUSAL_REASONS[number]

/** refuse: it should not go up; question: ask before it does. */
export interface Refusal { level: 'refuse' | 'question', reason: RefusalReason }

/** Common practice: water, safes, tile, engines, pianos and what can burn do not belong in an attic. */
const REFUSED_KEYS: Record<string, RefusalReason> = {
  'water-heater-40-gal-full': 'holds-water',
  'water-heater-50-gal-full': 'holds-water',
  'water-heater-80-gal-full': 'holds-water',
  'drain-pan-30-x-60-x-2-in-full-of-water': 'holds-water',
  'piano-spinet': 'too-heavy-for-any-attic',
  'plastic-tote-27-gal-full-of-books': 'too-heavy-for-any-attic',
  'bag-of-cement-or-concrete-mix-80-lb': 'building-material',
  'ceramic-tile-box-for-10-ft2': 'building-material',
  'paint-1-us-gal-latex-can': 'can-burn',
}

const QUESTIONED_KEYS: Record<string, RefusalReason> = {
  'water-heater-40-gal-empty': 'part-of-the-building',
  'air-handler-or-attic-furnace': 'part-of-the-building',
  'fish-tank-empty': 'holds-water',
  'asphalt-shingle-bundle': 'building-material',
  'hardwood-flooring-bundle-for-20-ft2': 'building-material',
}

/** Words in a label of one's own. A word may mislead (a toy engine), so it only raises a question. */
const QUESTIONED_WORDS: readonly (readonly [RegExp, RefusalReason])[] = [
  [/\b(water ?bed|aquarium|fish tank|water heater|boiler|hot tub)s?\b/i, 'holds-water'],
  [/\b(safe|piano|engine|anvil|pool table|gearbox|transmission)s?\b/i, 'too-heavy-for-any-attic'],
  [/\b(gas can|gasoline|petrol|propane|kerosene|fuel|paint|solvent|fireworks?|ammunition)s?\b/i, 'can-burn'],
  [/\b(tile|cement|concrete|mortar|sand|brick|paver|shingle|stone)s?\b/i, 'building-material'],
  [/\b(books?|magazines?|paper|documents?|records?|tools?|weights?|liquids?|wine|bottles?|jars?|coins?|batter(y|ies))\b/i, 'dense-by-name'],
]

/** Density from which a box counts as dense: the low end of packed books and paper (practice). */
const DENSE_LB_PER_FT3 = 25

export type RefusalInput = Pick<AtticItem, 'catalogueKey' | 'label' | 'count' | 'typicalLb' | 'lengthFt' | 'widthFt' | 'heightFt'>

function byName(item: Pick<RefusalInput, 'catalogueKey' | 'label'>): Refusal[] {
  if (item.catalogueKey !== null) {
    const refused = REFUSED_KEYS[item.catalogueKey]
    if (refused) return [{ level: 'refuse', reason: refused }]
    const questioned = QUESTIONED_KEYS[item.catalogueKey]
    return questioned ? [{ level: 'question', reason: questioned }] : []
  }
  return QUESTIONED_WORDS.filter(([words]) => words.test(item.label)).map(([, reason]) => ({ level: 'question' as const, reason }))
}

/** Why an item should not go up or must be asked about; empty when nothing speaks against it. Weight is of the whole pile. */
export function refusalsFor(item: RefusalInput, ratedPsf: number | null): Refusal[] {
  const refusals = byName(item)
  const weightLb = item.count * item.typicalLb
  if (item.typicalLb > ONE_PERSON_LIFT_LB) refusals.push({ level: 'question', reason: 'over-one-person-lift' })
  const volumeFt3 = item.heightFt === null ? null : item.lengthFt * item.widthFt * item.heightFt
  if (volumeFt3 !== null && volumeFt3 > 0 && weightLb / volumeFt3 >= DENSE_LB_PER_FT3) refusals.push({ level: 'question', reason: 'dense' })
  if (ratedPsf !== null && pressurePsf(weightLb, item.lengthFt, item.widthFt) > ratedPsf) {
    refusals.push({ level: 'question', reason: 'presses-more-than-rated' })
  }
  return refusals
}

/** What is refused is noted only with the reason why it is up there all the same: the list has to tell the truth. By field of the form. */
export function keptDespiteProblem({ catalogueKey, name, keptDespite }: { catalogueKey: string | null, name: string, keptDespite: string }): Record<string, string> {
  const isRefused = byName({ catalogueKey, label: name }).some(({ level }) => level === 'refuse')
  return isRefused && keptDespite.trim() === '' ? { keptDespite: 'This does not belong in an attic. If it is there all the same, say why it cannot come down.' } : {}
}

/** Contents people under-estimate most, by the words that name them (practice: ask about books, paper, tools, tile and liquids). */
const DENSE_WORDS: readonly (readonly [RegExp, typeof DENSE_CONTENTS[number]])[] = [
  [/\b(books?|magazines?|comics|records?|vinyl|lps?)\b/i, 'books'],
  [/\b(papers?|documents?|files|archive|photos?|albums?)\b/i, 'paper'],
  [/\b(tools?|hardware|screws|nails|weights?|coins?|batter(y|ies))\b/i, 'tools'],
  [/\b(tiles?|stones?|bricks?)\b/i, 'tile'],
  [/\b(liquids?|wine|beer|water|bottles?|jars?|preserves|canned|tins)\b/i, 'liquids'],
]

/** What a box may be full of, going by its name; null when nothing suggests it. */
export function suspectedContents(name: string): typeof DENSE_CONTENTS[number] | null {
  return DENSE_WORDS.find(([words]) => words.test(name))?.[1] ?? null
}
