import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import { unsound } from '../../utils/problems'
import { appendRecord } from './appendRecord'

/** The rooms as they stand side by side. The list must name each room of the unit once. */
export function orderRooms(db: Db, actor: Actor, unit: Thing<'unit'>, { roomIds }: { roomIds: string[] }) {
  return db.transaction().execute(async (trx) => {
    const rooms = await trx.selectFrom('room').select(['id', 'name', 'sort']).where('unitId', '=', unit.id).where('archivedAt', 'is', null)
      .orderBy('sort').orderBy('id').forUpdate().execute()
    const byId = new Map(rooms.map(room => [room.id, room]))
    const named = roomIds.flatMap(id => byId.get(id) ?? [])
    if (new Set(roomIds).size !== rooms.length || named.length !== rooms.length) {
      throw unsound({ roomIds: 'The rooms have changed meanwhile. Please load them again.' })
    }
    for (const [sort, room] of named.entries()) await trx.updateTable('room').set({ sort }).where('id', '=', room.id).execute()
    const before = rooms.map(room => room.name)
    const after = named.map(room => room.name)
    if (before.join('\n') !== after.join('\n')) {
      await appendRecord(trx, actor, {
        organisationId: unit.organisationId, unitId: unit.id, action: 'rooms put in another order', subjectKind: 'unit', subjectId: unit.id,
        before: { rooms: before }, after: { rooms: after },
      })
    }
    return { roomIds }
  })
}
