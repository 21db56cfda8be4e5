import { sql, type Expression } from 'kysely'
import { jsonBuildObject } from 'kysely/helpers/postgres'
import type { Db } from '../connect'
import { visibleUnits, type Actor } from './actor'
import type { Page, SectionParts, UnitCard } from '../../../shared/types/home'
import { dayIn } from '../../utils/clock'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'
import { reachOf } from '../../utils/policy'
import { atticsOf, marksOf, roomsOf, statusOf } from './unitParts'

const LIMIT = 30

/** Rooms, attics with items, and marks of one unit as one JSON value. */
export const sectionPartsOf = (db: Db, unitId: Expression<string>) =>
  sql<SectionParts>`json_build_object('rooms', ${roomsOf(db, unitId)}, 'attics', ${atticsOf(db, unitId)}, 'marks', ${marksOf(db, unitId)})`

/** Who lives there today. */
export const tenantNameOf = (db: Db, unitId: Expression<string>, today: string) => db.selectFrom('tenancy as t').select('t.tenantName')
  .where('t.unitId', '=', unitId).where('t.startsOn', '<=', today)
  .where(eb => eb.or([eb('t.endsOn', 'is', null), eb('t.endsOn', '>=', today)])).limit(1)

/** The units the asker may see, by property and name; keyset-paged. */
export async function listUnits(db: Db, actor: Actor, { search, after, sections }: { search?: string, after?: string, sections: 'yes' | 'no' }): Promise<Page<UnitCard>> {
  const from = readCursor(after, ['text', 'text', 'id'])
  const visible = visibleUnits(actor)
  if (visible !== 'all' && visible.length === 0) return { rows: [], next: null }
  const id = sql.ref<string>('u.id')
  const pattern = search ? likeAnywhere(search) : undefined
  const rows = await db.selectFrom('unit as u').innerJoin('property as p', 'p.id', 'u.propertyId')
    .select(['u.id', 'u.name', 'u.propertyId', 'p.name as propertyName'])
    .$if(Boolean(reachOf(actor.role, 'edit homes')), query => query.select(tenantNameOf(db, id, dayIn(actor.timeZone)).as('tenantName')))
    .$if(Boolean(reachOf(actor.role, 'see finding')), query => query.select(statusOf(db, id).as('status')))
    .$if(sections === 'yes', query => query.select(sectionPartsOf(db, id).as('section')))
    .where('u.organisationId', '=', actor.organisationId).where('u.archivedAt', 'is', null)
    .$if(visible !== 'all', query => query.where('u.id', 'in', visible as string[]))
    .$if(pattern !== undefined, query => query.where(eb => eb.or([eb('u.name', 'ilike', pattern!), eb('p.name', 'ilike', pattern!), addressMatches(pattern!)])))
    .$if(from !== undefined, query => query.where(sql<boolean>`(p.name, u.name, u.id) > (${from![0]}, ${from![1]}, ${from![2]}::uuid)`))
    .orderBy('p.name').orderBy('u.name').orderBy('u.id').limit(LIMIT + 1).execute()
  const page = pageOf(rows, LIMIT, row => [row.propertyName, row.name, row.id])
  return { ...page, rows: page.rows.map(row => ({ ...row, tenantName: row.tenantName ?? null, status: row.status ?? null, section: row.section ?? null })) }
}

export const addressMatches = (pattern: string) => sql<boolean>`array_to_string(p.address_lines, ' ') ilike ${pattern}`

/** A unit of a list as JSON, for lists nested in another row. Expects `u` (unit), `p` (property) in the statement. */
export const unitCardOf = (db: Db, today: string) => {
  const id = sql.ref<string>('u.id')
  return jsonBuildObject({
    id, name: sql.ref<string>('u.name'), propertyId: sql.ref<string>('p.id'), propertyName: sql.ref<string>('p.name'),
    tenantName: sql<string | null>`${tenantNameOf(db, id, today)}`, status: sql<UnitCard['status']>`${statusOf(db, id)}`, section: sectionPartsOf(db, id),
  })
}
