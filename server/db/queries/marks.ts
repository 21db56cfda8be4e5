import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { MarkListValue } from '../../../shared/schemas/mark'
import type { MarkFacts, MarkRow } from '../../../shared/types/markPage'
import type { Page } from '../../../shared/types/home'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'
import { runningTotalLb } from './attics'
import { limitColumns } from './limits'
import { fallRiskOfRoom } from './riskRank'

/**
 * Risk first: wet and moving above all, then what is watched, then what has too few readings; mended and closed last.
 * Among equals what could fall on whom, as a part of a step too small to reach the next one.
 */
const RISK = sql<number>`((case when m.state <> 'open' then 0 when m.stain_state = 'dripping' then 5 when m.activity = 'active' then 4
  when m.stain_state = 'damp' then 3 when m.activity = 'watch' then 2 when m.activity = 'too-few-readings' then 1.5 else 1 end)
  + least(${fallRiskOfRoom}, 400) / 1000)::double precision`
/** Days as a number, so that one cursor fits every order; no day sorts last. */
const DUE = sql<number>`coalesce(-(m.next_reading_on - date '1970-01-01'), -1000000)::double precision`

const ORDERS = { risk: RISK, newest: sql<number>`0::double precision`, due: DUE }

interface Sight { organisationId: string, units: 'all' | string[], today: string }

interface Given extends Record<'organisationId' | 'unit' | 'property' | 'today' | 'search' | 'pattern', string>, Record<'afterRank' | 'afterNumber' | 'limit', number> {
  units: string[]
  kind: NonNullable<MarkListValue['kind']>
  activity: NonNullable<MarkListValue['activity']>
  state: NonNullable<MarkListValue['state']>
}
type Condition = 'units' | 'kind' | 'activity' | 'state' | 'unit' | 'property' | 'late' | 'search' | 'after'

const markRows = compiledOnce((db, given: Given, { sort, conditions }: { sort: MarkListValue['sort'], conditions: Condition[] }) => {
  const rank = ORDERS[sort]
  const has = (condition: Condition) => conditions.includes(condition)
  return db.selectFrom('mark as m').innerJoin('unit as u', 'u.id', 'm.unitId').innerJoin('property as p', 'p.id', 'u.propertyId').innerJoin('room as r', 'r.id', 'm.roomId')
    .select(['m.id', 'm.number', 'm.label', 'm.kind', 'm.state', 'm.activity', 'm.widthClass', 'm.lastValue', 'm.lastReadOn', 'm.slopePerYear', 'm.nextReadingOn', 'm.stainState',
      'm.unitId', 'u.name as unitName', 'u.propertyId', 'p.name as propertyName', 'r.name as roomName', rank.as('rank')])
    .where('m.organisationId', '=', given.organisationId)
    .$if(has('units'), query => query.where(eb => eb('m.unitId', '=', eb.fn.any(eb.val(given.units)))))
    .$if(has('kind'), query => query.where(eb => eb('m.kind', '=', eb.fn.any(eb.val(given.kind)))))
    .$if(has('activity'), query => query.where(eb => eb('m.activity', '=', eb.fn.any(eb.val(given.activity)))))
    .$if(has('state'), query => query.where(eb => eb('m.state', '=', eb.fn.any(eb.val(given.state)))))
    .$if(has('unit'), query => query.where('m.unitId', '=', given.unit))
    .$if(has('property'), query => query.where('u.propertyId', '=', given.property))
    .$if(has('late'), query => query.where('m.nextReadingOn', '<', given.today).where('m.state', '!=', 'closed'))
    .$if(has('search'), query => query.where(eb => eb.or([
      eb('m.label', 'ilike', given.pattern), eb('u.name', 'ilike', given.pattern), eb('p.name', 'ilike', given.pattern), eb(sql`m.number::text`, '=', given.search),
    ])))
    .$if(has('after'), query => query.where(sql<boolean>`(${rank}, m.number) < (${given.afterRank}::double precision, ${given.afterNumber}::double precision)`))
    .orderBy(rank, 'desc').orderBy('m.number', 'desc').limit(given.limit)
})

/** Marks of one organisation within the asker's sight, keyset-paged on (order, number), both falling. */
export async function listMarks(db: Db, { organisationId, units, today }: Sight, filter: MarkListValue): Promise<Page<MarkRow & { rank: number }>> {
  const after = readCursor(filter.after, ['number', 'number'])
  const { kind = [], activity = [], state = [], unit, property, search = '' } = filter
  const asked: Record<Condition, boolean> = {
    units: units !== 'all', kind: kind.length > 0, activity: activity.length > 0, state: state.length > 0,
    unit: unit !== undefined, property: property !== undefined, late: filter.due === 'late', search: search !== '', after: after !== undefined,
  }
  const conditions = (Object.keys(asked) as Condition[]).filter(condition => asked[condition])
  const rows = await markRows.rows(db, {
    organisationId, today, kind, activity, state, search, units: units === 'all' ? [] : units, unit: unit ?? '', property: property ?? '',
    pattern: likeAnywhere(search), afterRank: after?.[0] ?? 0, afterNumber: after?.[1] ?? 0, limit: filter.limit + 1,
  }, { sort: filter.sort, conditions })
  return pageOf(rows, filter.limit, row => [row.rank, row.number])
}

const markFacts = compiledOnce((db, { id }: { id: string }) =>
  db.selectFrom('mark').select(['id', 'organisationId', 'unitId', 'roomId', 'atticId', 'number', 'kind', 'label', 'pinX', 'pinY', 'place', 'shape', 'direction', 'firstSeenOn',
    'state', 'segment', 'activity', 'widthClass', 'lastValue', 'lastReadOn', 'slopePerYear', 'nextReadingOn', 'stainState', 'notes', 'createdAt', 'version', 'joinedInto'])
    .where('id', '=', id).$castTo<MarkFacts>())

export const findMarkFacts = (db: Db, id: string) => markFacts.first(db, { id })

const markSurroundings = compiledOnce((db, { id }: { id: string }) =>
  db.selectFrom('mark as m').innerJoin('room as r', 'r.id', 'm.roomId').innerJoin('unit as u', 'u.id', 'm.unitId')
    .innerJoin('property as p', 'p.id', 'u.propertyId').innerJoin('organisation as o', 'o.id', 'm.organisationId').leftJoin('attic as a', 'a.id', 'm.atticId')
    .select(['r.id as roomId', 'r.name as roomName', 'r.lengthFt', 'r.widthFt', 'u.id as unitId', 'u.name as unitName', 'p.id as propertyId', 'p.name as propertyName', 'p.yearBuilt',
      'a.id as atticId', 'a.name as atticName', 'o.timeZone', 'o.contactPhone', ...limitColumns])
    .where('m.id', '=', id))

export const findMarkSurroundings = (db: Db, id: string) => markSurroundings.first(db, { id })

const roomsInUse = compiledOnce((db, { unitId }: { unitId: string }) =>
  db.selectFrom('room').select(['id', 'name', 'lengthFt', 'widthFt']).where('unitId', '=', unitId).where('archivedAt', 'is', null).orderBy('sort').orderBy('id'))

export const listRoomsOf = (db: Db, unitId: string) => roomsInUse.rows(db, { unitId })

const jobsOfMark = compiledOnce((db, { markId }: { markId: string }) =>
  db.selectFrom('job').select(['id', 'number', 'title', 'state', 'dueOn', 'doneOn']).where('markId', '=', markId).orderBy('dueOn', 'desc').limit(50))

export const listJobsOfMark = (db: Db, markId: string) => jobsOfMark.rows(db, { markId })

const loadSteps = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('loadEvent as e').select(['happenedOn as on', runningTotalLb.as('totalLb')]).where('atticId', '=', atticId).orderBy('happenedOn').orderBy('recordedAt').orderBy('e.id').limit(2000))

/** What the attic weighed after each change, oldest first. */
export const listLoadSteps = (db: Db, atticId: string) => loadSteps.rows(db, { atticId })
