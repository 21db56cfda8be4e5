import { sql } from 'kysely'
import type { Db } from '../connect'
import type { OverviewDue } from '../../../shared/types/overview'
import { INSPECTION_MONTHS, INVENTORY_CONFIRM_MONTHS } from '../../../shared/utils/upkeep/cadence'

const MOST_UPCOMING = 30

/** The days on which things will fall due, by the cadences the daily review uses; once due, its own items stand for them. */
const comingDays = (organisationId: string) => sql`
  select 'reading' kind, id subject_id, unit_id, next_reading_on due_on from mark where organisation_id = ${organisationId} and state <> 'closed'
  union all select 'job', id, unit_id, due_on from job where organisation_id = ${organisationId} and state in ('planned', 'scheduled')
  union all select 'look-again', id, unit_id, look_again_on from finding where organisation_id = ${organisationId} and cleared_at is null and unit_id is not null
  union all select 'inventory', a.id, a.unit_id, (coalesce(a.inventory_confirmed_on, i.since) + make_interval(months => ${INVENTORY_CONFIRM_MONTHS}))::date
    from attic a join lateral (select min(placed_on) since from attic_item where attic_id = a.id and removed_on is null) i on i.since is not null
    where a.organisation_id = ${organisationId} and a.archived_at is null
  union all select 'inspection', a.id, a.unit_id, (greatest(
      (select max(surveyed_on) from attic_survey where attic_id = a.id),
      (select max(written_on) from attic_document where attic_id = a.id and kind = 'inspection-record' and withdrawn_at is null)
    ) + make_interval(months => case when exists (select from attic_item where attic_id = a.id and removed_on is null) then ${INSPECTION_MONTHS.loaded}::int else ${INSPECTION_MONTHS.empty}::int end))::date
    from attic a where a.organisation_id = ${organisationId} and a.archived_at is null`

/** What is due up to a day, the late first: open due items, and what will become one. */
export async function findUpcoming(db: Db, organisationId: string, untilOn: string): Promise<OverviewDue[]> {
  const { rows } = await sql<OverviewDue>`
    with due as (select kind, subject_id, unit_id, due_on from due_item where organisation_id = ${organisationId} and settled_at is null),
      coming as (${comingDays(organisationId)})
    select d.kind, d.subject_id, d.unit_id, u.name unit_name, p.name property_name, d.due_on
    from (select * from due union all select * from coming where not exists (select from due where due.kind = coming.kind and due.subject_id = coming.subject_id)) d
    join unit u on u.id = d.unit_id join property p on p.id = u.property_id
    where d.due_on <= ${untilOn} and u.archived_at is null
    order by d.due_on, d.kind, d.subject_id limit ${MOST_UPCOMING}`.execute(db)
  return rows
}
