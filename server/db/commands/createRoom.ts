import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import type { RoomCreateValue } from '../../../shared/schemas/room'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord, type RecordActor } from './appendRecord'
import { refuseArchived } from './refuseArchived'

/** The new room stands after the others in the section. */
export function createRoom(db: Db, actor: Actor, unit: Thing<'unit'>, input: RoomCreateValue) {
  refuseArchived(unit, 'unit')
  return db.transaction().execute(async (trx) => {
    const last = await trx.selectFrom('room').select(eb => eb.fn.max<number | null>('sort').as('sort')).where('unitId', '=', unit.id).executeTakeFirstOrThrow()
    return insertRoom(trx, actor, unit, { ...input, sort: (last.sort ?? -1) + 1 })
  })
}

export async function insertRoom(trx: Trx, actor: RecordActor, unit: { id: string, organisationId: string }, input: RoomCreateValue & { sort: number }) {
  const id = newId()
  const { organisationId } = unit
  await trx.insertInto('room').values({ id, organisationId, unitId: unit.id, ...input, archivedAt: null, createdAt: nowInstant() }).execute()
  const { sort: _sort, ...facts } = input
  await appendRecord(trx, actor, { organisationId, unitId: unit.id, action: 'room added', subjectKind: 'room', subjectId: id, after: facts })
  return { id }
}
