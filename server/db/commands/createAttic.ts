import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import type { AtticCreateValue } from '../../../shared/schemas/home'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord, type RecordActor } from './appendRecord'
import { judgeAttic } from './judgeAttic'
import { refuseArchived } from './refuseArchived'

export function createAttic(db: Db, actor: Actor, unit: Thing<'unit'>, input: AtticCreateValue) {
  refuseArchived(unit, 'unit')
  return db.transaction().execute(trx => insertAttic(trx, actor, unit, input))
}

export async function insertAttic(trx: Trx, actor: RecordActor, unit: { id: string, organisationId: string }, input: AtticCreateValue) {
  const id = newId()
  const { organisationId } = unit
  await trx.insertInto('attic').values({ id, organisationId, unitId: unit.id, ...input, inventoryConfirmedOn: null, archivedAt: null, createdAt: nowInstant() }).execute()
  await appendRecord(trx, actor, { organisationId, unitId: unit.id, action: 'attic added', subjectKind: 'attic', subjectId: id, after: input })
  await judgeAttic(trx, actor, id)
  return { id }
}
