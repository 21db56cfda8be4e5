import type { GuessRecord } from '../../types/atticDetail'
import type { ItemCategory, ItemOwner, WeightSource } from '../../types/item'
import type { Contents } from '../goods/goodsDensities'
import type { InventoryTotal } from '../goods/inventoryTotal'
import type { Refusal, RefusalReason } from '../goods/refusals'
import { formatShare, formatWeight, type UnitSystem } from '../units'

export const ITEM_CATEGORY_WORDS: Record<ItemCategory, string> = {
  'boxes': 'Boxes and totes', 'holiday': 'Holiday things', 'sports-and-travel': 'Sports and travel', 'nursery': 'Nursery', 'bedroom': 'Bedroom',
  'living-room': 'Living room', 'dining-and-kitchen': 'Dining and kitchen', 'appliances': 'Appliances', 'office': 'Office', 'tools': 'Tools and materials',
  'yard': 'Yard', 'building-equipment': 'Building equipment', 'other': 'Something else',
}

export const CONTENTS_WORDS: Record<Contents, string> = {
  'mixed-household': 'Mixed household things', 'bedding': 'Bedding', 'clothes': 'Clothes', 'dishes': 'Dishes', 'toys': 'Toys', 'books': 'Books',
  'paper': 'Paper and files', 'tools': 'Tools and hardware', 'tile': 'Tile', 'liquids': 'Liquids',
}

export const WEIGHT_SOURCE_WORDS: Record<WeightSource, string> = {
  catalogue: 'Typical weight from the catalogue', estimate: 'Estimate', weighed: 'Weighed',
}

export const ITEM_OWNER_WORDS: Record<ItemOwner, string> = { landlord: 'Landlord', tenant: 'Tenant' }

const REFUSAL_WORDS: Record<RefusalReason, string> = {
  'holds-water': 'Water is heavy, and a leak makes everything heavier.',
  'too-heavy-for-any-attic': 'This is too heavy for an attic.',
  'can-burn': 'Things that can burn do not belong in an attic.',
  'building-material': 'Building material is dense: a small pile is more than a ceiling is framed for.',
  'part-of-the-building': 'This is equipment of the building. An engineer or the permit decides where it may stand.',
  'dense-by-name': 'This may be heavier than it looks. What is inside, and how full is it?',
  'over-one-person-lift': 'This is more than one person should lift (51 lb, 23 kg, in ideal conditions: NIOSH).',
  'dense': 'This is as dense as packed books. Is the size right?',
  'presses-more-than-rated': 'It presses more on the spot it stands on than the attic is rated for.',
}

export function refusalSentence(refusal: Refusal): string {
  return refusal.level === 'refuse' ? `Not for the attic. ${REFUSAL_WORDS[refusal.reason]}` : REFUSAL_WORDS[refusal.reason]
}

/** '420 lb, likely between 360 lb and 510 lb'. */
export function bandSentence(total: InventoryTotal, system: UnitSystem = 'us'): string {
  return `${formatWeight(total.typicalLb, system)}, likely between ${formatWeight(total.lowLb, system)} and ${formatWeight(total.highLb, system)}`
}

export function chanceSentence(chance: number): string {
  if (chance < 0.005) return 'The chance of being over the rating is below 1 %.'
  return `The chance of being over the rating is about ${formatShare(chance)}.`
}

/** After a weighing: how far the guess was off, of one piece. */
export function guessSentence(guess: { name: string, typicalLb: number, lowLb: number, highLb: number }, weighedLb: number, system: UnitSystem = 'us'): string {
  const off = weighedLb / guess.typicalLb - 1
  const weighed = `${guess.name} weighs ${formatWeight(weighedLb, system)}; ${formatWeight(guess.typicalLb, system)} was taken before`
  if (Math.abs(off) < 0.05) return `${weighed}. That was right.`
  const inside = weighedLb >= guess.lowLb && weighedLb <= guess.highLb ? 'still inside the range' : 'outside the range'
  return `${weighed}: ${formatShare(Math.abs(off))} too ${off > 0 ? 'little' : 'much'}, ${inside}.`
}

/** Ours: fewer weighings say nothing about a person. */
const FEWEST_WEIGHINGS = 3

/** After some weighings: which way this person's weights lean; null while it is too early or they do not lean. */
export function leaningSentence({ count, medianRatio }: GuessRecord): string | null {
  if (count < FEWEST_WEIGHINGS || medianRatio === null) return null
  const off = medianRatio - 1
  if (Math.abs(off) < 0.1) return `Your last ${count} weights were about right in the middle. Keep guessing the way you do.`
  return off > 0
    ? `Of your ${count} weights checked on a scale, the middle one was ${formatShare(off)} heavier than noted. Guess higher, or weigh.`
    : `Of your ${count} weights checked on a scale, the middle one was ${formatShare(-off)} lighter than noted.`
}
