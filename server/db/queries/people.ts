import { sql } from 'kysely'
import type { Db } from '../connect'
import type { Actor } from './actor'
import type { Page } from '../../../shared/types/home'
import type { PersonRow } from '../../../shared/types/invitation'
import type { PeopleFilter } from '../../../shared/schemas/invitation'
import { dayIn } from '../../utils/clock'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'

const LIMIT = 50

/** The homes somebody may see, as one JSON list: by a tenancy that is not over, or by access for an engineer. */
const unitsOf = (today: string) => sql<PersonRow['units']>`(
  select coalesce(json_agg(json_build_object('id', u.id, 'name', u.name, 'propertyName', p.name, 'untilOn', granted.until_on) order by p.name, u.name), '[]'::json)
  from (
    select t.unit_id, t.ends_on as until_on from tenancy_person tp join tenancy t on t.id = tp.tenancy_id
      where m.role = 'tenant' and tp.user_id = m.user_id and tp.organisation_id = m.organisation_id and (t.ends_on is null or t.ends_on >= ${today}::date)
    union all
    select a.unit_id, a.until_on from unit_access a
      where m.role = 'engineer' and a.user_id = m.user_id and a.organisation_id = m.organisation_id and (a.until_on is null or a.until_on >= ${today}::date)
  ) granted join unit u on u.id = granted.unit_id join property p on p.id = u.property_id)`

/** Everybody in the organisation today, by name; keyset-paged. */
export async function listPeople(db: Db, actor: Actor, { search, role, after }: PeopleFilter): Promise<Page<PersonRow>> {
  const from = readCursor(after, ['text', 'id'])
  const pattern = search ? likeAnywhere(search) : undefined
  const rows = await db.selectFrom('membership as m').innerJoin('appUser as u', 'u.id', 'm.userId')
    .select(['m.id', 'm.userId', 'u.name', 'u.email', 'u.phone', 'm.role', 'm.createdAt as joinedAt', unitsOf(dayIn(actor.timeZone)).as('units'),
      sql<string>`lower(u.name)`.as('sortName'),
      sql<number>`(select count(*) from membership o where o.organisation_id = m.organisation_id and o.role = 'owner' and o.ended_at is null)`.as('owners')])
    .where('m.organisationId', '=', actor.organisationId).where('m.endedAt', 'is', null)
    .$if(role !== undefined, query => query.where('m.role', '=', role!))
    .$if(pattern !== undefined, query => query.where(eb => eb.or([eb('u.name', 'ilike', pattern!), eb('u.email', 'ilike', pattern!)])))
    .$if(from !== undefined, query => query.where(sql<boolean>`(lower(u.name), m.id) > (${from![0]}, ${from![1]}::uuid)`))
    .orderBy(sql`lower(u.name)`).orderBy('m.id').limit(LIMIT + 1).execute()
  const page = pageOf(rows, LIMIT, row => [row.sortName, row.id])
  return {
    ...page,
    rows: page.rows.map(({ sortName, owners, ...row }) => ({
      ...row, mayEnd: row.role !== 'owner' || (actor.role === 'owner' && owners > 1),
    })),
  }
}
