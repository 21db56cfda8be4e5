import { z } from 'zod'
import { ITEM_CATEGORIES, ITEM_OWNERS, WEIGHT_SOURCES, type WeightSource } from '../types/item'
import { catalogueItem } from '../utils/goods/itemCatalogue'
import { day, longText, measure, shortText, version } from './fields'

const weightLb = (what: string) => z.number({ error: `Please give ${what} in pounds.` }).min(0, 'Not less than 0 lb.').max(20_000, 'That is more than 20,000 lb.')
const placeFt = (what: string, max: number) => z.number({ error: `Please give ${what} in feet.` }).min(0, 'Not outside the wall.').max(max, `That is more than ${max} ft.`)

const item = {
  name: shortText('What is it?', 160),
  catalogueKey: z.string().max(120).refine(key => catalogueItem(key) !== null, 'That is not in the catalogue.').nullable(),
  category: z.enum(ITEM_CATEGORIES),
  quantity: z.int('A whole number, please.').min(1, 'At least one.').max(1000, 'At most 1,000 pieces in a line.'),
  /** Of one piece. */
  lowLb: weightLb('the least it may weigh'),
  typicalLb: weightLb('what it weighs').refine(value => value > 0, 'More than 0 lb.'),
  highLb: weightLb('the most it may weigh'),
  weightSource: z.enum(WEIGHT_SOURCES),
  belongsTo: z.enum(ITEM_OWNERS),
  fieldNumber: z.int().min(1).max(20),
  xFt: placeFt('the distance from the wall', 100),
  yFt: placeFt('the place across the joists', 200),
  lengthFt: measure('the length along the joists in feet', 40),
  widthFt: measure('the width across the joists in feet', 40),
  heightFt: measure('the height in feet', 20).nullable(),
  notes: longText(2000),
  keptDespite: longText(500).default(''),
  /** Pictures sent before, now shown with this item. */
  photoIds: z.array(z.uuid()).max(6, 'At most 6 photos at a time.').default([]),
}

interface Weights { weightSource: WeightSource, lowLb: number, typicalLb: number, highLb: number }

function soundWeights(value: Weights, context: z.RefinementCtx) {
  const { weightSource, lowLb, typicalLb, highLb } = value
  const add = (message: string) => context.addIssue({ code: 'custom', path: ['typicalLb'], message })
  if (!(lowLb <= typicalLb && typicalLb <= highLb)) add('Least, usual and most must be in that order.')
  else if (weightSource === 'weighed' && lowLb !== highLb) add('What was weighed has one weight.')
}

export const AtticItemInput = z.strictObject({ ...item, placedOn: day('When was it put there?') }).superRefine(soundWeights)

export const AtticItemEdit = z.strictObject({ ...item, happenedOn: day('When did this change?'), version }).superRefine(soundWeights)

/** Several moves saved at once from the load plan. */
export const AtticItemMoves = z.strictObject({
  happenedOn: day('When were they moved?'),
  moves: z.array(z.strictObject({
    itemId: z.uuid(), version, fieldNumber: item.fieldNumber, xFt: item.xFt, yFt: item.yFt, lengthFt: item.lengthFt, widthFt: item.widthFt,
  })).min(1, 'Nothing was moved.').max(500)
    .refine(moves => new Set(moves.map(move => move.itemId)).size === moves.length, 'Each thing moves once.'),
})

export const AtticItemRemoval = z.strictObject({ removedOn: day('When was it taken out?'), version })
/** Several things changed in one go, all or none. */
export const AtticItemBulk = z.strictObject({
  items: z.array(z.strictObject({ itemId: z.uuid(), version })).min(1, 'Choose at least one.').max(500)
    .refine(items => new Set(items.map(item => item.itemId)).size === items.length, 'Each thing once.'),
  change: z.discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('take-out'), removedOn: day('When were they taken out?') }),
    z.strictObject({ kind: z.literal('owner'), belongsTo: z.enum(ITEM_OWNERS) }),
  ]),
})
export type AtticItemBulkValue = z.output<typeof AtticItemBulk>

export const TermsSignatureInput = z.strictObject({
  signedName: shortText('Write your name as you sign.', 120),
  /** The text that was read, so that nobody signs what changed meanwhile. */
  rules: z.array(z.string().max(600)).min(1).max(40),
})

export const InventoryListInput = z.strictObject({ csv: z.string({ error: 'Choose a CSV file.' }).min(1, 'The file is empty.').max(240_000, 'The file is too long. Split it into several.') })
export const InventoryImportInput = InventoryListInput.extend({ skipBad: z.boolean() })

export const InventoryConfirmation = z.strictObject({ confirmedOn: day('When did you look?') })

export type AtticItemValue = z.output<typeof AtticItemInput>
/** What a person says of an item, without the days. */
export type ItemFacts = Omit<AtticItemValue, 'placedOn'>
export type AtticItemEditValue = z.output<typeof AtticItemEdit>
export type AtticItemMovesValue = z.output<typeof AtticItemMoves>
export type AtticItemRemovalValue = z.output<typeof AtticItemRemoval>
