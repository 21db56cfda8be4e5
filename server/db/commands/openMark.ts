import { sql } from 'kysely'
import type { Selectable } from 'kysely'
import type { Trx } from '../connect'
import type { MarkTable } from '../schema/ceilings'
import type { ObservationAnswers } from '../../../shared/types/mark'
import { MARK_KIND_WORDS } from '../../../shared/utils/messages/markMessages'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord, type RecordActor } from './appendRecord'
import { takeNumber } from './takeNumber'

export type FollowedMark = Selectable<MarkTable>

type OpeningAnswers = Pick<ObservationAnswers, 'kind' | 'pin' | 'place' | 'shape' | 'direction' | 'stain'> & { firstSeenOn: string }

const MIDDLE = 0.5

/** A new mark with its number and record entry. The attic above is named only where the home has exactly one. */
export async function openMark(trx: Trx, actor: RecordActor & { userId: string }, unit: { id: string, organisationId: string }, room: { id: string, name: string }, answers: OpeningAnswers): Promise<FollowedMark> {
  const attics = await trx.selectFrom('attic').select('id').where('unitId', '=', unit.id).where('archivedAt', 'is', null).limit(2).execute()
  const mark = await trx.insertInto('mark').values({
    id: newId(), organisationId: unit.organisationId, unitId: unit.id, roomId: room.id, atticId: attics.length === 1 ? attics[0]!.id : null,
    number: await takeNumber(trx, unit.organisationId), kind: answers.kind, label: `${MARK_KIND_WORDS[answers.kind]}, ${room.name}`,
    pinX: answers.pin?.xShare ?? MIDDLE, pinY: answers.pin?.yShare ?? MIDDLE,
    place: answers.place, shape: answers.shape, direction: answers.direction, firstSeenOn: answers.firstSeenOn,
    stainState: answers.stain === 'none' ? null : answers.stain, createdBy: actor.userId, createdAt: nowInstant(),
  }).returningAll().executeTakeFirstOrThrow()
  await appendRecord(trx, actor, {
    organisationId: mark.organisationId, unitId: mark.unitId, subjectKind: 'mark', subjectId: mark.id, action: 'mark opened',
    after: { number: mark.number, kind: mark.kind, label: mark.label, roomId: mark.roomId, atticId: mark.atticId, pinX: mark.pinX, pinY: mark.pinY, firstSeenOn: mark.firstSeenOn },
  })
  return mark
}

/** Something was seen where it had been repaired: the same segment goes on, the state is open again. */
export async function reopenMark(trx: Trx, actor: RecordActor, mark: FollowedMark, on: string, reason: string): Promise<FollowedMark> {
  const after = await trx.updateTable('mark').set({ state: 'open', version: sql`version + 1` }).where('id', '=', mark.id).returningAll().executeTakeFirstOrThrow()
  await appendRecord(trx, actor, {
    organisationId: mark.organisationId, unitId: mark.unitId, subjectKind: 'mark', subjectId: mark.id, action: 'mark reopened',
    before: { state: mark.state }, after: { state: 'open', happenedOn: on, reason },
  })
  return after
}
