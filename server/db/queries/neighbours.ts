import { sql } from 'kysely'
import type { NeighbourView } from '../../../shared/types/neighbours'
import { groupByKey } from '../../../shared/utils/groupByKey'
import { neighbourControl } from '../../../shared/utils/movement/neighbourControl'
import type { Db } from '../connect'
import { visibleUnits, type Actor } from './actor'
import type { Thing } from './things'

/** Ours: so many marks of a house are looked at, the most read ones. */
const MOST_NEIGHBOURS = 40

/** Marks of the same kind on other ceilings of the same property that have been read more than once. */
async function findNeighbours(db: Db, actor: Actor, mark: Thing<'mark'>) {
  const units = visibleUnits(actor)
  return db.selectFrom('mark as m').innerJoin('unit as u', 'u.id', 'm.unitId').innerJoin('room as r', 'r.id', 'm.roomId')
    .innerJoin('reading as g', join => join.onRef('g.markId', '=', 'm.id').onRef('g.segment', '=', 'm.segment').on('g.value', 'is not', null))
    .select(['m.id', 'm.number', 'm.label', 'm.atticId', 'r.name as roomName', 'm.unitId', 'u.name as unitName'])
    .where('u.propertyId', '=', eb => eb.selectFrom('unit').select('propertyId').where('id', '=', mark.unitId))
    .where('m.roomId', '!=', mark.roomId).where('m.kind', '=', mark.kind).where('m.state', '!=', 'closed')
    .$if(units !== 'all', query => query.where('m.unitId', '=', sql<string>`any(${units}::uuid[])`))
    .groupBy(['m.id', 'r.id', 'u.id']).having(sql<boolean>`count(*) > 1`).orderBy(sql`count(*)`, 'desc').orderBy('m.number').limit(MOST_NEIGHBOURS).execute()
}

const findReadings = (db: Db, markIds: readonly string[]) =>
  db.selectFrom('reading as r').innerJoin('mark as m', join => join.onRef('m.id', '=', 'r.markId').onRef('m.segment', '=', 'r.segment'))
    .select(['r.markId', 'r.takenOn', sql<number>`r.value`.as('value'), sql<number>`r.sigma`.as('sigma')])
    .where('r.markId', '=', sql<string>`any(${markIds}::uuid[])`).where('r.value', 'is not', null).execute()

/** How marks on other ceilings of the house moved in the months this one was read. */
export async function findNeighbourView(db: Db, actor: Actor, mark: Thing<'mark'>): Promise<NeighbourView> {
  const marks = await findNeighbours(db, actor, mark)
  const readings = groupByKey(await findReadings(db, [mark.id, ...marks.map(neighbour => neighbour.id)]), reading => reading.markId)
  const control = neighbourControl(readings.get(mark.id) ?? [], marks.map(({ id }) => ({ markId: id, readings: readings.get(id) ?? [] })))
  return {
    ...control,
    neighbours: control.neighbours.map((answer, i) => {
      const { number, label, roomName, unitId, unitName, atticId } = marks[i]!
      return { ...answer, number, label, roomName, unitId, unitName, underSameAttic: atticId !== null && atticId === mark.atticId }
    }),
  }
}
