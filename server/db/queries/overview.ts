import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { AtticCounts, OverviewChange, OverviewDecision } from '../../../shared/types/overview'
import type { Activity } from '../../../shared/types/mark'
import { fallRiskOfSubject, riskRank } from './riskRank'
import { atticsOf, marksOf, roomsOf } from './unitParts'

/** Homes shown as waiting for a decision; the rest is counted and listed on the findings page. */
const MOST_DECISIONS = 12
const MOST_CHANGES = 8

const decisionRows = compiledOnce((db, given: { organisationId: string }) => db.selectFrom('unitStatus as us')
  .innerJoin('finding as f', 'f.id', 'us.topFindingId')
  .innerJoin('unit as u', 'u.id', 'us.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
  .select(eb => [
    'us.unitId', 'u.name as unitName', 'p.name as propertyName', 'us.openFindings', 'f.severity',
    'f.id', 'f.rule', 'f.evidence', 'f.adviceCode', 'f.openedAt', 'f.subjectKind', 'f.subjectId',
    roomsOf(db, eb.ref('us.unitId')).as('rooms'), atticsOf(db, eb.ref('us.unitId')).as('attics'), marksOf(db, eb.ref('us.unitId')).as('marks'),
  ])
  .where('us.organisationId', '=', given.organisationId).where('us.worstSeverity', 'in', ['urgent', 'attention']).where('u.archivedAt', 'is', null)
  .orderBy(sql`case us.worst_severity when 'urgent' then 0 else 1 end`).orderBy(riskRank('f.rule')).orderBy(fallRiskOfSubject('f.subject_id'), 'desc').orderBy('f.openedAt').orderBy('us.unitId')
  .limit(MOST_DECISIONS))

/** Homes with something that waits for a person: worst first, by what could hurt somebody, then longest open. */
export async function findDecisions(db: Db, organisationId: string): Promise<OverviewDecision[]> {
  const rows = await decisionRows.rows(db, { organisationId })
  return rows.map(({ unitId, unitName, propertyName, openFindings, severity, rooms, attics, marks, subjectKind, subjectId, ...finding }) => ({
    unitId, unitName, propertyName, openFindings, severity,
    // The rule decides what its evidence holds: both are written by keepFindings from one Finding.
    finding: { ...finding, severity, subject: { kind: subjectKind, id: subjectId } } as OverviewDecision['finding'],
    parts: { rooms: rooms ?? [], attics: attics ?? [], marks: marks ?? [] },
  }))
}

type Counts = Record<'homes' | 'needDecision' | 'lateReadings' | 'lateJobs' | 'spentThisYearCents' | keyof AtticCounts | 'dormant' | 'watch' | 'active' | 'tooFew', number>

export async function countPortfolio(db: Db, organisationId: string, today: string) {
  const { rows: [row] } = await sql<Counts>`
    select h.homes, h.need_decision, h.late_readings, j.late_jobs, j.spent_this_year_cents, a.*, m.*
    from (select count(*) filter (where u.archived_at is null) homes,
        count(*) filter (where u.archived_at is null and us.worst_severity in ('urgent', 'attention')) need_decision,
        coalesce(sum(us.late_readings) filter (where u.archived_at is null), 0)::int late_readings
      from unit u left join unit_status us on us.unit_id = u.id where u.organisation_id = ${organisationId}) h,
    (select count(*) filter (where state in ('planned', 'scheduled') and due_on < ${today}::date) late_jobs,
        coalesce(sum(cost_cents) filter (where done_on >= date_trunc('year', ${today}::date)), 0)::bigint spent_this_year_cents
      from job where organisation_id = ${organisationId}) j,
    (select count(*) filter (where s.load_state = 'within') as "within", count(*) filter (where s.load_state = 'near') near,
        count(*) filter (where s.load_state = 'over') "over", count(*) filter (where s.load_state = 'hold') hold,
        count(*) filter (where s.load_state is null or s.load_state = 'unsurveyed') unsurveyed
      from attic t left join attic_status s on s.attic_id = t.id where t.organisation_id = ${organisationId} and t.archived_at is null) a,
    (select count(*) filter (where activity = 'dormant') dormant, count(*) filter (where activity = 'watch') watch,
        count(*) filter (where activity = 'active') active, count(*) filter (where activity = 'too-few-readings') too_few
      from mark where organisation_id = ${organisationId} and state = 'open') m`.execute(db)
  const counts = row!
  const attics: AtticCounts = { within: counts.within, near: counts.near, over: counts.over, hold: counts.hold, unsurveyed: counts.unsurveyed }
  const marks: Record<Activity, number> = { 'active': counts.active, 'watch': counts.watch, 'dormant': counts.dormant, 'too-few-readings': counts.tooFew }
  return { homes: counts.homes, needDecision: counts.needDecision, attics, marks, late: { readings: counts.lateReadings, jobs: counts.lateJobs }, spentThisYearCents: counts.spentThisYearCents }
}

interface Asker { organisationId: string, userId: string }

/** What others and the program itself wrote since the asker last looked: per home, how often each thing happened. */
export async function findChanges(db: Db, { organisationId, userId }: Asker, since: string | null): Promise<OverviewChange[]> {
  if (!since) return []
  const { rows } = await sql<OverviewChange>`
    select t.unit_id, u.name unit_name, p.name property_name, t.last_at, t.actions
    from (select unit_id, to_char(max(last_at) at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"') last_at, max(last_at) sort_at,
        json_agg(json_build_object('action', action, 'count', n) order by last_at desc) actions
      from (select unit_id, action, count(*) n, max(recorded_at) last_at from record_entry
        where organisation_id = ${organisationId} and recorded_at > ${since} and unit_id is not null and actor_id is distinct from ${userId}::uuid group by unit_id, action) e
      group by unit_id order by max(last_at) desc limit ${MOST_CHANGES}) t
    join unit u on u.id = t.unit_id join property p on p.id = u.property_id order by t.sort_at desc`.execute(db)
  return rows
}

/** Ours: one visit, however often the page is loaded within these hours. */
const ONE_VISIT_MS = 8 * 3_600_000

const lookedRow = compiledOnce((db, given: { organisationId: string, userId: string }) => db.selectFrom('membership').select(['lastLookedAt', 'lookedBeforeAt'])
  .where('organisationId', '=', given.organisationId).where('userId', '=', given.userId))

/** When the asker last looked before this visit; null at the first one. */
export async function findLastLooked(db: Db, organisationId: string, userId: string, at: string): Promise<string | null> {
  const row = await lookedRow.first(db, { organisationId, userId })
  if (!row?.lastLookedAt) return null
  return Date.parse(at) - Date.parse(row.lastLookedAt) < ONE_VISIT_MS ? row.lookedBeforeAt : row.lastLookedAt
}

/** Notes a visit once; the one before it stays what changes are counted from. */
export const noteLooked = (db: Db, organisationId: string, userId: string, at: string) =>
  db.updateTable('membership').set(eb => ({ lookedBeforeAt: eb.ref('lastLookedAt'), lastLookedAt: at }))
    .where('organisationId', '=', organisationId).where('userId', '=', userId)
    .where(eb => eb.or([eb('lastLookedAt', 'is', null), eb('lastLookedAt', '<', new Date(Date.parse(at) - ONE_VISIT_MS).toISOString())])).execute()
