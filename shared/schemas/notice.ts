import { z } from 'zod'
import { id, shortText } from './fields'

const AREA = 'Which part of the room is to be kept clear?'
const WAITING = 'What is it waiting for?'

/** Exactly one cause: the attic above, or a finding about the ceiling. Area and waiting have words of their own when left out. */
export const NoticeInput = z.strictObject({
  atticId: id.nullable().default(null),
  findingId: id.nullable().default(null),
  area: shortText(AREA, 200).optional(),
  waitingFor: shortText(WAITING, 500).optional(),
}).refine(({ atticId, findingId }) => (atticId === null) !== (findingId === null), { path: ['cause'], message: 'Name the attic or the finding it is for.' })
export type NoticeValue = z.input<typeof NoticeInput>

export const LiftingInput = z.strictObject({ reason: shortText('Why may the room be used again? It stands in the record.', 1000) })
export type LiftingValue = z.output<typeof LiftingInput>
