import { z } from 'zod'
import { longText, shortText, version } from './fields'
import { RoomCreate } from './room'

const addressLines = z.array(z.string().trim().max(160, 'At most 160 letters in a line, please.'))
  .max(8, 'At most 8 lines, please.').transform(lines => lines.filter(line => line !== ''))

/** The database keeps 1500 to 2200; a year outside is a slip of the finger. */
const yearBuilt = z.int('A year has four figures, such as 1954.')
  .min(1500, 'A year has four figures, such as 1954.').max(2200, 'That year is still far off.').nullable()

const property = {
  name: shortText('What do you call this property?', 160),
  addressLines,
  yearBuilt,
  notes: longText(),
}
const unit = {
  name: shortText('What do you call this unit?', 160),
  notes: longText(),
  accessNotes: longText(2000),
}

/** What a landlord of one house can say in one form: the unit, its rooms and the attic over them. */
export const FirstUnit = z.strictObject({
  name: unit.name,
  rooms: z.array(RoomCreate).max(40, 'At most 40 rooms at once, please.').default([]),
  atticName: shortText('What do you call this attic?').nullable().default(null),
})

export const PropertyCreate = z.strictObject({
  ...property,
  addressLines: addressLines.default([]),
  yearBuilt: yearBuilt.default(null),
  notes: property.notes.default(''),
  firstUnit: FirstUnit.nullable().default(null),
})
export const PropertyEdit = z.strictObject({ ...property, version })

export const UnitCreate = z.strictObject({
  ...unit,
  notes: unit.notes.default(''),
  accessNotes: unit.accessNotes.default(''),
  rooms: z.array(RoomCreate).max(40, 'At most 40 rooms at once, please.').default([]),
  atticName: shortText('What do you call this attic?').nullable().default(null),
})
export const UnitEdit = z.strictObject({ ...unit, version })

export const AtticCreate = z.strictObject({ name: shortText('What do you call this attic?'), notes: longText().default('') })

/** Archiving and restoring: only the version seen. */
export const SeenVersion = z.strictObject({ version })

export type PropertyCreateInput = z.input<typeof PropertyCreate>
export type PropertyCreateValue = z.output<typeof PropertyCreate>
export type PropertyEditValue = z.output<typeof PropertyEdit>
export type UnitCreateValue = z.output<typeof UnitCreate>
export type UnitEditValue = z.output<typeof UnitEdit>
export type AtticCreateValue = z.output<typeof AtticCreate>
export type SeenVersionValue = z.output<typeof SeenVersion>
