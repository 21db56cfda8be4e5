import { sql } from 'kysely'
import type { Trx } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { riskRank } from '../queries/riskRank'

/**
 * Adds up what the portfolio reads of one unit. Worst severity and top finding are among the findings that wait for a
 * person; an acknowledged one is open but silent until its day to look again.
 */
export async function updateUnitStatus(trx: Trx, unitId: string) {
  const unit = await trx.selectFrom('unit as u').innerJoin('organisation as o', 'o.id', 'u.organisationId')
    .select(['u.id', 'u.organisationId', 'u.propertyId', 'o.timeZone']).where('u.id', '=', unitId).executeTakeFirstOrThrow()
  const today = dayIn(unit.timeZone)
  await sql`
    insert into unit_status (unit_id, organisation_id, property_id, worst_severity, open_findings, top_finding_id,
      attic_count, load_state, utilisation, stored_lb, open_marks, active_marks, late_readings, changed_at)
    select ${unit.id}, ${unit.organisationId}, ${unit.propertyId}, top.severity, open.findings, top.id,
      attics.n, worst.load_state, attics.utilisation, coalesce(attics.stored_lb, 0), marks.n, marks.active, marks.late, ${nowInstant()}
    from (select count(*) findings from finding where unit_id = ${unit.id} and cleared_at is null) open
    left join lateral (select id, severity from finding
      where unit_id = ${unit.id} and cleared_at is null and acknowledged_at is null
      order by case severity when 'urgent' then 0 when 'attention' then 1 else 2 end, ${riskRank('rule')}, opened_at, id limit 1) top on true
    cross join (select count(*) n, max(s.utilisation) utilisation, sum(s.stored_lb) stored_lb
      from attic a left join attic_status s on s.attic_id = a.id where a.unit_id = ${unit.id} and a.archived_at is null) attics
    left join lateral (select coalesce(s.load_state, 'unsurveyed') load_state
      from attic a left join attic_status s on s.attic_id = a.id where a.unit_id = ${unit.id} and a.archived_at is null
      order by array_position(array['over', 'hold', 'near', 'unsurveyed', 'within'], coalesce(s.load_state, 'unsurveyed')) limit 1) worst on true
    cross join (select count(*) filter (where state = 'open') n, count(*) filter (where state = 'open' and activity = 'active') active,
        count(*) filter (where next_reading_on < ${today}::date) late
      from mark where unit_id = ${unit.id} and state <> 'closed') marks
    on conflict (unit_id) do update set property_id = excluded.property_id, worst_severity = excluded.worst_severity,
      open_findings = excluded.open_findings, top_finding_id = excluded.top_finding_id, attic_count = excluded.attic_count,
      load_state = excluded.load_state, utilisation = excluded.utilisation, stored_lb = excluded.stored_lb,
      open_marks = excluded.open_marks, active_marks = excluded.active_marks, late_readings = excluded.late_readings, changed_at = excluded.changed_at
  `.execute(trx)
}
