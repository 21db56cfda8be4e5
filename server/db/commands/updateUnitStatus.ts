import { sql, type RawBuilder } from 'kysely'
import type { Db, Trx } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { fallRiskOfSubject, riskRank } from '../queries/riskRank'

/** Everything the portfolio reads of a unit but the instant of the last change. */
const COLUMNS = sql.raw('unit_id, organisation_id, property_id, worst_severity, open_findings, top_finding_id, attic_count, load_state, utilisation, stored_lb, open_marks, active_marks, late_readings')

/**
 * What the portfolio is to read of units, added up from what is kept of them. Worst severity and top finding are among the
 * findings that wait for a person; an acknowledged one is open but silent until its day to look again.
 */
const addedUp = (unitIds: readonly string[], today: string): RawBuilder<unknown> => sql`
  select u.id as unit_id, u.organisation_id, u.property_id, top.severity as worst_severity, open.findings::integer as open_findings, top.id as top_finding_id,
    attics.n::integer as attic_count, worst.load_state, attics.utilisation, coalesce(attics.stored_lb, 0) as stored_lb,
    marks.n::integer as open_marks, marks.active::integer as active_marks, marks.late::integer as late_readings
  from unit u
  cross join lateral (select count(*) findings from finding where unit_id = u.id and cleared_at is null) open
  left join lateral (select id, severity from finding
    where unit_id = u.id and cleared_at is null and acknowledged_at is null
    order by case severity when 'urgent' then 0 when 'attention' then 1 else 2 end, ${riskRank('rule')}, ${fallRiskOfSubject('subject_id')} desc, opened_at, id limit 1) top on true
  cross join lateral (select count(*) n, max(s.utilisation) utilisation, sum(s.stored_lb) stored_lb
    from attic a left join attic_status s on s.attic_id = a.id where a.unit_id = u.id and a.archived_at is null) attics
  left join lateral (select coalesce(s.load_state, 'unsurveyed') load_state
    from attic a left join attic_status s on s.attic_id = a.id where a.unit_id = u.id and a.archived_at is null
    order by array_position(array['over', 'hold', 'near', 'unsurveyed', 'within'], coalesce(s.load_state, 'unsurveyed')) limit 1) worst on true
  cross join lateral (select count(*) filter (where state = 'open') n, count(*) filter (where state = 'open' and activity = 'active') active,
      count(*) filter (where next_reading_on < ${today}::date) late
    from mark where unit_id = u.id and state <> 'closed') marks
  where u.id = any(${unitIds}::uuid[])`

/** Rows that are not kept like this yet. */
const differing = (unitIds: readonly string[], today: string): RawBuilder<unknown> => sql`
  select ${COLUMNS} from (${addedUp(unitIds, today)}) now
  except select ${COLUMNS} from unit_status where unit_id = any(${unitIds}::uuid[])`

/** Adds up what the portfolio reads of one unit. */
export async function updateUnitStatus(trx: Trx, unitId: string) {
  const { timeZone } = await trx.selectFrom('unit as u').innerJoin('organisation as o', 'o.id', 'u.organisationId').select('o.timeZone').where('u.id', '=', unitId).executeTakeFirstOrThrow()
  await updateUnitStatuses(trx, [unitId], dayIn(timeZone))
}

/** The same for many units of one organisation; what is kept rightly is not written again. */
export async function updateUnitStatuses(trx: Trx, unitIds: readonly string[], today: string) {
  await sql`insert into unit_status (${COLUMNS}, changed_at) select ${COLUMNS}, ${nowInstant()}::timestamptz from (${differing(unitIds, today)}) wrong
    on conflict (unit_id) do update set property_id = excluded.property_id, worst_severity = excluded.worst_severity,
      open_findings = excluded.open_findings, top_finding_id = excluded.top_finding_id, attic_count = excluded.attic_count,
      load_state = excluded.load_state, utilisation = excluded.utilisation, stored_lb = excluded.stored_lb,
      open_marks = excluded.open_marks, active_marks = excluded.active_marks, late_readings = excluded.late_readings, changed_at = excluded.changed_at
  `.execute(trx)
}

/** Units whose summary is not what their rows add up to. */
export async function findStaleStatuses(db: Db, unitIds: readonly string[], today: string): Promise<Set<string>> {
  const { rows } = await sql<{ unitId: string }>`select unit_id from (${differing(unitIds, today)}) wrong`.execute(db)
  return new Set(rows.map(row => row.unitId))
}
