import { sql } from 'kysely'
import type { Db, Trx } from '../connect'
import { insertRows, rowSet } from '../rowSet'
import { now, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { findUnitsUnderReview } from '../queries/reviewing'
import { appendRecords, SYSTEM_ACTOR } from './appendRecord'
import { judgeForReview, wantsWriting, type ReviewedUnitVerdict } from './judgeForReview'
import { keepDueItems } from './keepDueItems'
import { keepAllFindings, type KeptChange } from './keepFindings'
import { lockUnits } from './lockUnit'
import { tellStaffAboutMark, tellStaffUrgent } from './tellStaff'
import { findStaleStatuses, updateUnitStatuses } from './updateUnitStatus'

export interface UnitsReview { attics: number, marks: number, due: number, written: number }

/**
 * The share of some units in the daily review: everything judged anew, what is due kept, silent findings heard again. They
 * are judged without a lock first; only those where something would change are locked, read again and written, in one
 * transaction. A night on which nothing happened writes nothing.
 */
export async function reviewUnits(db: Db, organisationId: string, unitIds: string[]): Promise<UnitsReview> {
  const verdicts = (await findUnitsUnderReview(db, organisationId, unitIds, { toWrite: false })).map(judgeForReview)
  const first = verdicts[0]
  if (!first) return { attics: 0, marks: 0, due: 0, written: 0 }
  const stale = await findStaleStatuses(db, unitIds, first.today)
  const atMs = now().getTime()
  const changed = verdicts.filter(verdict => stale.has(verdict.unitId) || wantsWriting(verdict, atMs)).map(verdict => verdict.unitId)
  if (changed.length > 0) await db.transaction().execute(trx => carryOut(trx, organisationId, changed))
  const add = (of: (verdict: ReviewedUnitVerdict) => number) => verdicts.reduce((sum, verdict) => sum + of(verdict), 0)
  return { attics: add(verdict => verdict.attics.length), marks: add(verdict => verdict.marks.length), due: add(verdict => verdict.due.wanted.length), written: changed.length }
}

async function carryOut(trx: Trx, organisationId: string, unitIds: string[]) {
  await lockUnits(trx, organisationId, unitIds)
  const verdicts = (await findUnitsUnderReview(trx, organisationId, unitIds, { toWrite: true })).map(judgeForReview)
  const today = verdicts[0]?.today
  if (today === undefined) return
  await storeMarks(trx, verdicts)
  await storeAttics(trx, verdicts)
  const kept = await keepAllFindings(trx, verdicts.map(verdict => verdict.findings))
  for (const [i, verdict] of verdicts.entries()) await tellStaff(trx, verdict, kept[i]!)
  await returnFindings(trx, verdicts, kept.flat())
  await keepDueItems(trx, verdicts.map(verdict => verdict.due))
  await updateUnitStatuses(trx, unitIds, today)
}

async function storeMarks(trx: Trx, verdicts: readonly ReviewedUnitVerdict[]) {
  const changed = verdicts.flatMap(({ marks }) => marks.filter(mark => !mark.isKept).map(({ mark, status }) => ({ id: mark.id, ...status })))
  if (changed.length === 0) return
  const rows = rowSet(changed, { id: 'uuid', activity: 'text', slopePerYear: 'double precision', lastValue: 'double precision', lastReadOn: 'date', widthClass: 'integer', nextReadingOn: 'date' })
  await sql`update mark m set activity = v.activity, slope_per_year = v.slope_per_year, last_value = v.last_value, last_read_on = v.last_read_on,
    width_class = v.width_class, next_reading_on = v.next_reading_on from ${rows} where m.id = v.id`.execute(trx)
}

async function storeAttics(trx: Trx, verdicts: readonly ReviewedUnitVerdict[]) {
  const changed = verdicts.flatMap(({ attics }) => attics.filter(attic => !attic.isKept))
  if (changed.length === 0) return
  await trx.deleteFrom('atticStatus').where('atticId', '=', sql<string>`any(${changed.map(attic => attic.id)}::uuid[])`).execute()
  const judgedAt = nowInstant()
  await insertRows(trx, 'atticStatus', changed.flatMap(({ id, organisationId, unitId, status }) => status ? [{ atticId: id, organisationId, unitId, ...status, judgedAt }] : []), {
    atticId: 'uuid', organisationId: 'uuid', unitId: 'uuid', loadState: 'text', utilisation: 'double precision', storedLb: 'double precision', ratedPsf: 'double precision', judgedAt: 'timestamptz',
  })
}

/** One mail a person about each thing that became urgent, as when it is judged by itself. */
async function tellStaff(trx: Trx, { organisationId, unitId, attics, marks }: ReviewedUnitVerdict, changes: KeptChange[]) {
  const about = (subjectId: string) => changes.filter(change => change.subjectId === subjectId)
  for (const { id } of attics) await tellStaffUrgent(trx, { organisationId, unitId, changes: about(id) })
  for (const { mark, reports } of marks) await tellStaffAboutMark(trx, { mark, reports, changes: about(mark.id) })
  const known = new Set([...attics.map(({ id }) => id), ...marks.map(({ mark }) => mark.id)])
  await tellStaffUrgent(trx, { organisationId, unitId, changes: changes.filter(change => !known.has(change.subjectId)) })
}

/** An acknowledged finding whose day to look again has come waits for a person once more; one that changed just now has said so itself. */
async function returnFindings(trx: Trx, verdicts: readonly ReviewedUnitVerdict[], kept: readonly KeptChange[]) {
  const over = new Set(kept.filter(change => change.kind === 'cleared' || change.kind === 'escalated').map(change => change.findingId))
  const returning = verdicts.flatMap(verdict => verdict.returning).filter(row => !over.has(row.id))
  if (returning.length === 0) return
  const at = nowInstant()
  const { rows } = await sql<{ id: string, organisationId: string, unitId: string, severity: string, evidence: object, rule: string }>`
    update finding set acknowledged_at = null, acknowledged_by = null, acknowledged_reason = null, look_again_on = null, changed_at = ${at}, version = version + 1
    where id = any(${returning.map(row => row.id)}::uuid[]) returning id, organisation_id, unit_id, severity, evidence, rule`.execute(trx)
  await insertRows(trx, 'findingEvent', rows.map(row => ({ id: newId(), organisationId: row.organisationId, findingId: row.id, kind: 'returned', severity: row.severity, evidence: row.evidence, happenedAt: at })), {
    id: 'uuid', organisationId: 'uuid', findingId: 'uuid', kind: 'text', severity: 'text', evidence: 'jsonb', happenedAt: 'timestamptz',
  })
  await appendRecords(trx, SYSTEM_ACTOR, rows.map(({ id, organisationId, unitId, rule, severity }) => ({
    organisationId, unitId, subjectKind: 'finding', subjectId: id, action: 'finding returned', after: { rule, severity },
  })))
}
