import type { Trx } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { findJudgedAttic, findJudgedMark } from '../queries/judging'
import { findReviewedUnit, type ReviewedUnit } from '../queries/reviewing'
import { appendRecord, SYSTEM_ACTOR } from './appendRecord'
import { judgeLockedAttic } from './judgeAttic'
import { judgeLockedMark } from './judgeMark'
import { judgeLockedUnit } from './judgeUnit'
import { keepDueItems } from './keepDueItems'
import { lockUnit } from './lockUnit'
import { updateUnitStatus } from './updateUnitStatus'

export interface UnitReview { attics: number, marks: number, due: number }

/** One unit's share of the daily review, in one transaction: everything judged anew, what is due kept, silent findings heard again. */
export async function reviewUnit(trx: Trx, unitId: string): Promise<UnitReview> {
  const unit = await findReviewedUnit(trx, unitId)
  if (!unit) return { attics: 0, marks: 0, due: 0 }
  await lockUnit(trx, unit.organisationId, unit.id)
  const attics = await trx.selectFrom('attic').select('id').where('unitId', '=', unitId).orderBy('id').execute()
  for (const { id } of attics) {
    const attic = await findJudgedAttic(trx, id)
    if (attic) await judgeLockedAttic(trx, attic)
  }
  // A mark somebody is editing this moment is judged by their own change.
  const marks = await trx.selectFrom('mark').select('id').where('unitId', '=', unitId).where('state', '!=', 'closed').orderBy('id').forNoKeyUpdate().skipLocked().execute()
  for (const { id } of marks) {
    const mark = await findJudgedMark(trx, id)
    if (mark) await judgeLockedMark(trx, mark)
  }
  await judgeLockedUnit(trx, unit)
  await returnFindings(trx, unit)
  const { due } = await keepDueItems(trx, unit)
  await updateUnitStatus(trx, unitId)
  return { attics: attics.length, marks: marks.length, due }
}

/** An acknowledged finding whose day to look again has come waits for a person once more. */
async function returnFindings(trx: Trx, unit: ReviewedUnit) {
  const rows = await trx.updateTable('finding')
    .set(eb => ({ acknowledgedAt: null, acknowledgedBy: null, acknowledgedReason: null, lookAgainOn: null, changedAt: nowInstant(), version: eb('version', '+', 1) }))
    .where('unitId', '=', unit.id).where('clearedAt', 'is', null).where('acknowledgedAt', 'is not', null).where('lookAgainOn', '<=', dayIn(unit.timeZone))
    .returningAll().execute()
  for (const { id, severity, evidence, rule } of rows) {
    await trx.insertInto('findingEvent').values({
      id: newId(), organisationId: unit.organisationId, findingId: id, kind: 'returned', severity, evidence: JSON.stringify(evidence), happenedAt: nowInstant(),
    }).execute()
    await appendRecord(trx, SYSTEM_ACTOR, { organisationId: unit.organisationId, unitId: unit.id, subjectKind: 'finding', subjectId: id, action: 'finding returned', after: { rule, severity } })
  }
}
