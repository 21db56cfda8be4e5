import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import { dayIn, nowInstant } from '../../utils/clock'
import { problem } from '../../utils/problems'
import { editRow } from './editRow'

type Seen = { version: number }

/**
 * Archiving takes a home out of every list and review; nothing of it is deleted.
 * A home somebody lives in is not archived: it would no longer be watched.
 */
export function archiveUnit(db: Db, actor: Actor, unit: Thing<'unit'>, { version }: Seen) {
  return db.transaction().execute(async (trx) => {
    await refuseWhileLet(trx, actor, [unit.id])
    return setUnitArchived(trx, actor, { ...unit, version }, nowInstant())
  })
}

export function restoreUnit(db: Db, actor: Actor, unit: Thing<'unit'>, { version }: Seen) {
  return db.transaction().execute(async (trx) => {
    const property = await trx.selectFrom('property').select('archivedAt').where('id', '=', unit.propertyId).executeTakeFirst()
    if (property?.archivedAt) throw problem(409, 'archived', 'The property of this unit is archived. Restore the property first.')
    return setUnitArchived(trx, actor, { ...unit, version }, null)
  })
}

/** The units in sight go with it, at the same instant, so that restoring brings back those and no others. */
export function archiveProperty(db: Db, actor: Actor, property: Thing<'property'>, { version }: Seen) {
  return db.transaction().execute(async (trx) => {
    const units = await unitsOf(trx, property.id, null)
    await refuseWhileLet(trx, actor, units.map(unit => unit.id))
    const at = nowInstant()
    for (const unit of units) await setUnitArchived(trx, actor, unit, at)
    return setPropertyArchived(trx, actor, { ...property, version }, at)
  })
}

export function restoreProperty(db: Db, actor: Actor, property: Thing<'property'>, { version }: Seen) {
  return db.transaction().execute(async (trx) => {
    const restored = await setPropertyArchived(trx, actor, { ...property, version }, null)
    const units = property.archivedAt ? await unitsOf(trx, property.id, property.archivedAt) : []
    for (const unit of units) await setUnitArchived(trx, actor, unit, null)
    return restored
  })
}

export function archiveRoom(db: Db, actor: Actor, room: Thing<'room'>, { version }: Seen) {
  return db.transaction().execute(async (trx) => {
    const mark = await trx.selectFrom('mark').select('number').where('roomId', '=', room.id).where('state', '!=', 'closed').limit(1).executeTakeFirst()
    if (mark) throw problem(409, 'room-has-marks', `Mark ${mark.number} on this ceiling is still being followed. Close it first.`)
    return setRoomArchived(trx, actor, { ...room, version }, nowInstant())
  })
}

export function restoreRoom(db: Db, actor: Actor, room: Thing<'room'>, { version }: Seen) {
  return db.transaction().execute(trx => setRoomArchived(trx, actor, { ...room, version }, null))
}

type Archivable = { id: string, organisationId: string, version: number }

const wordFor = (archivedAt: string | null) => archivedAt ? 'archived' : 'restored'

const setPropertyArchived = (trx: Trx, actor: Actor, { id, organisationId, version }: Archivable, archivedAt: string | null) =>
  editRow<Thing<'property'>>(trx, actor, {
    table: 'property', id, version, patch: { archivedAt },
    record: { organisationId, unitId: null, subjectKind: 'property', action: `property ${wordFor(archivedAt)}` },
  })

const setUnitArchived = (trx: Trx, actor: Actor, { id, organisationId, version }: Archivable, archivedAt: string | null) =>
  editRow<Thing<'unit'>>(trx, actor, {
    table: 'unit', id, version, patch: { archivedAt },
    record: { organisationId, unitId: id, subjectKind: 'unit', action: `unit ${wordFor(archivedAt)}` },
  })

const setRoomArchived = (trx: Trx, actor: Actor, { id, organisationId, version, unitId }: Archivable & { unitId: string }, archivedAt: string | null) =>
  editRow<Thing<'room'>>(trx, actor, {
    table: 'room', id, version, patch: { archivedAt },
    record: { organisationId, unitId, subjectKind: 'room', action: `room ${wordFor(archivedAt)}` },
  })

const unitsOf = (trx: Trx, propertyId: string, archivedAt: string | null) =>
  trx.selectFrom('unit').select(['id', 'organisationId', 'version']).where('propertyId', '=', propertyId)
    .where('archivedAt', archivedAt === null ? 'is' : '=', archivedAt).orderBy('id').forUpdate().execute()

async function refuseWhileLet(trx: Trx, actor: Actor, unitIds: string[]) {
  if (unitIds.length === 0) return
  const today = dayIn(actor.timeZone)
  const current = await trx.selectFrom('tenancy as t').innerJoin('unit as u', 'u.id', 't.unitId').select(['t.tenantName', 'u.name'])
    .where('t.unitId', 'in', unitIds)
    .where(eb => eb.or([eb('t.endsOn', 'is', null), eb('t.endsOn', '>=', today)]))
    .orderBy('t.startsOn').limit(1).executeTakeFirst()
  if (current) throw problem(409, 'still-let', `${current.tenantName} has ${current.name}. Give that tenancy a last day in the past first.`)
}
