import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import type { PropertyEditValue, UnitEditValue } from '../../../shared/schemas/home'
import type { RoomEditValue } from '../../../shared/schemas/room'
import { editRow } from './editRow'

export function editProperty(db: Db, actor: Actor, property: Thing<'property'>, { version, ...patch }: PropertyEditValue) {
  return db.transaction().execute(trx => editRow<Thing<'property'>>(trx, actor, {
    table: 'property', id: property.id, version, patch,
    record: { organisationId: property.organisationId, unitId: null, subjectKind: 'property', action: 'property changed' },
  }))
}

export function editUnit(db: Db, actor: Actor, unit: Thing<'unit'>, { version, ...patch }: UnitEditValue) {
  return db.transaction().execute(trx => editRow<Thing<'unit'>>(trx, actor, {
    table: 'unit', id: unit.id, version, patch,
    record: { organisationId: unit.organisationId, unitId: unit.id, subjectKind: 'unit', action: 'unit changed' },
  }))
}

export function editRoom(db: Db, actor: Actor, room: Thing<'room'>, { version, ...patch }: RoomEditValue) {
  return db.transaction().execute(trx => editRow<Thing<'room'>>(trx, actor, {
    table: 'room', id: room.id, version, patch,
    record: { organisationId: room.organisationId, unitId: room.unitId, subjectKind: 'room', action: 'room changed' },
  }))
}
