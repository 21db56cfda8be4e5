import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import type { UnitCreateValue } from '../../../shared/schemas/home'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord, type RecordActor } from './appendRecord'
import { insertAttic } from './createAttic'
import { insertRoom } from './createRoom'
import { refuseArchived } from './refuseArchived'

export function createUnit(db: Db, actor: Actor, property: Thing<'property'>, input: UnitCreateValue) {
  refuseArchived(property, 'property')
  return db.transaction().execute(trx => insertUnit(trx, actor, { organisationId: property.organisationId, propertyId: property.id }, input))
}

export async function insertUnit(trx: Trx, actor: RecordActor, place: { organisationId: string, propertyId: string }, input: UnitCreateValue) {
  const { rooms, atticName, ...facts } = input
  const id = newId()
  const createdAt = nowInstant()
  await trx.insertInto('unit').values({ id, ...place, ...facts, archivedAt: null, createdAt }).execute()
  await trx.insertInto('unitStatus').values({
    unitId: id, ...place, worstSeverity: null, topFindingId: null, loadState: null, utilisation: null, changedAt: createdAt,
  }).execute()
  await appendRecord(trx, actor, { organisationId: place.organisationId, unitId: id, action: 'unit added', subjectKind: 'unit', subjectId: id, after: facts })
  const unit = { id, organisationId: place.organisationId }
  for (const [sort, room] of rooms.entries()) await insertRoom(trx, actor, unit, { ...room, sort })
  const attic = atticName ? await insertAttic(trx, actor, unit, { name: atticName, notes: '' }) : null
  return { id, atticId: attic?.id ?? null }
}
