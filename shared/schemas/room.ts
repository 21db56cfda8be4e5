import { z } from 'zod'
import { CEILING_FINISHES } from '../types/attic'
import { id, measureOrUnknown, shortText, version } from './fields'

const room = {
  name: shortText('What do you call this room?'),
  isBedroom: z.boolean(),
  lengthFt: measureOrUnknown('the length in feet', 200),
  widthFt: measureOrUnknown('the width in feet', 200),
  ceilingHeightIn: measureOrUnknown('the height to the ceiling in inches', 600),
  ceilingFinish: z.enum(CEILING_FINISHES, { error: 'What is the ceiling made of?' }),
}

/** A name is enough to begin with; the rest can be measured later. */
export const RoomCreate = z.strictObject({
  name: room.name,
  isBedroom: room.isBedroom.default(false),
  lengthFt: room.lengthFt.default(null),
  widthFt: room.widthFt.default(null),
  ceilingHeightIn: room.ceilingHeightIn.default(null),
  ceilingFinish: room.ceilingFinish.default('unknown'),
})
export const RoomEdit = z.strictObject({ ...room, version })

/** The rooms of a unit as they stand side by side in the section, first to last. */
export const RoomOrder = z.strictObject({ roomIds: z.array(id).min(1).max(200) })

export type RoomCreateValue = z.output<typeof RoomCreate>
export type RoomEditValue = z.output<typeof RoomEdit>
