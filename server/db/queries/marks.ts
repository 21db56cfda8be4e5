import { sql } from 'kysely'
import type { Db } from '../connect'
import type { MarkListValue } from '../../../shared/schemas/mark'
import type { MarkFacts, MarkRow } from '../../../shared/types/markPage'
import type { Page } from '../../../shared/types/home'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'
import { runningTotalLb } from './attics'

/** Risk first: wet and moving above all, then what is watched, then what has too few readings; mended and closed last. */
const RISK = sql<number>`(case when m.state <> 'open' then 0 when m.stain_state = 'dripping' then 5 when m.activity = 'active' then 4
  when m.stain_state = 'damp' then 3 when m.activity = 'watch' then 2 when m.activity = 'too-few-readings' then 1.5 else 1 end)::double precision`
/** Days as a number, so that one cursor fits every order; no day sorts last. */
const DUE = sql<number>`coalesce(-(m.next_reading_on - date '1970-01-01'), -1000000)::double precision`

const ORDERS = { risk: RISK, newest: sql<number>`0::double precision`, due: DUE }

interface Sight { organisationId: string, units: 'all' | string[], today: string }

/** Marks of one organisation within the asker's sight, keyset-paged on (order, number), both falling. */
export async function listMarks(db: Db, { organisationId, units, today }: Sight, filter: MarkListValue): Promise<Page<MarkRow & { rank: number }>> {
  const rank = ORDERS[filter.sort]
  const { kind, activity, state, search } = filter
  const after = readCursor(filter.after, ['number', 'number'])
  const rows = await db.selectFrom('mark as m').innerJoin('unit as u', 'u.id', 'm.unitId').innerJoin('property as p', 'p.id', 'u.propertyId').innerJoin('room as r', 'r.id', 'm.roomId')
    .select(['m.id', 'm.number', 'm.label', 'm.kind', 'm.state', 'm.activity', 'm.widthClass', 'm.lastValue', 'm.lastReadOn', 'm.slopePerYear', 'm.nextReadingOn', 'm.stainState',
      'm.unitId', 'u.name as unitName', 'u.propertyId', 'p.name as propertyName', 'r.name as roomName', rank.as('rank')])
    .where('m.organisationId', '=', organisationId)
    .$if(units !== 'all', query => query.where(eb => eb('m.unitId', '=', eb.fn.any(eb.val(units as string[])))))
    .$if(Boolean(kind?.length), query => query.where('m.kind', 'in', kind!))
    .$if(Boolean(activity?.length), query => query.where('m.activity', 'in', activity!))
    .$if(Boolean(state?.length), query => query.where('m.state', 'in', state!))
    .$if(filter.unit !== undefined, query => query.where('m.unitId', '=', filter.unit!))
    .$if(filter.property !== undefined, query => query.where('u.propertyId', '=', filter.property!))
    .$if(filter.due === 'late', query => query.where('m.nextReadingOn', '<', today).where('m.state', '!=', 'closed'))
    .$if(Boolean(search), query => query.where(eb => eb.or([
      eb('m.label', 'ilike', likeAnywhere(search!)), eb('u.name', 'ilike', likeAnywhere(search!)), eb('p.name', 'ilike', likeAnywhere(search!)), eb(sql`m.number::text`, '=', search!),
    ])))
    .$if(after !== undefined, query => query.where(sql<boolean>`(${rank}, m.number) < (${after![0]}::double precision, ${after![1]}::double precision)`))
    .orderBy(rank, 'desc').orderBy('m.number', 'desc').limit(filter.limit + 1).execute()
  return pageOf(rows, filter.limit, row => [row.rank, row.number])
}

export const findMarkFacts = (db: Db, id: string): Promise<MarkFacts | undefined> =>
  db.selectFrom('mark').select(['id', 'organisationId', 'unitId', 'roomId', 'atticId', 'number', 'kind', 'label', 'pinX', 'pinY', 'place', 'shape', 'direction', 'firstSeenOn',
    'state', 'segment', 'activity', 'widthClass', 'lastValue', 'lastReadOn', 'slopePerYear', 'nextReadingOn', 'stainState', 'notes', 'createdAt', 'version'])
    .where('id', '=', id).$castTo<MarkFacts>().executeTakeFirst()

export const findMarkSurroundings = (db: Db, id: string) =>
  db.selectFrom('mark as m').innerJoin('room as r', 'r.id', 'm.roomId').innerJoin('unit as u', 'u.id', 'm.unitId')
    .innerJoin('property as p', 'p.id', 'u.propertyId').innerJoin('organisation as g', 'g.id', 'm.organisationId').leftJoin('attic as a', 'a.id', 'm.atticId')
    .select(['r.id as roomId', 'r.name as roomName', 'r.lengthFt', 'r.widthFt', 'u.id as unitId', 'u.name as unitName', 'p.id as propertyId', 'p.name as propertyName', 'p.yearBuilt',
      'a.id as atticId', 'a.name as atticName', 'g.timeZone', 'g.contactPhone', 'g.seasonAllowanceMm'])
    .where('m.id', '=', id).executeTakeFirst()

export const listRoomsOf = (db: Db, unitId: string) =>
  db.selectFrom('room').select(['id', 'name']).where('unitId', '=', unitId).where('archivedAt', 'is', null).orderBy('sort').orderBy('id').execute()

export const listJobsOfMark = (db: Db, markId: string) =>
  db.selectFrom('job').select(['id', 'number', 'title', 'state', 'dueOn', 'doneOn']).where('markId', '=', markId).orderBy('dueOn', 'desc').limit(50).execute()

/** What the attic weighed after each change, oldest first. */
export const listLoadSteps = (db: Db, atticId: string) =>
  db.selectFrom('loadEvent as e').select(['happenedOn as on', runningTotalLb.as('totalLb')]).where('atticId', '=', atticId).orderBy('happenedOn').orderBy('recordedAt').orderBy('e.id').limit(2000).execute()
