import type { Acknowledgement } from '../../../shared/schemas/finding'
import type { FindingView } from '../../../shared/types/findingView'
import { lookAgainUntilOn } from '../../../shared/utils/upkeep/lookAgain'
import { formatDay } from '../../../shared/utils/days'
import type { Db, Trx } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { clash, problem, unsound } from '../../utils/problems'
import type { Actor } from '../queries/actor'
import { findFindingView } from '../queries/findings'
import { things, type Thing } from '../queries/things'
import { appendRecord } from './appendRecord'
import { lockUnit } from './lockUnit'
import { updateUnitStatus } from './updateUnitStatus'

type Finding = Thing<'finding'>

/** Lets a finding rest until a day, with the reason: it stays open and comes back by itself. A graver one may rest less long. */
export async function acknowledgeFinding(db: Db, actor: Actor, finding: Finding, { reason, lookAgainOn, version }: Acknowledgement): Promise<FindingView> {
  const today = dayIn(actor.timeZone)
  const until = lookAgainUntilOn(finding, today)
  if (lookAgainOn <= today) throw unsound({ lookAgainOn: 'Choose a day after today.' })
  if (lookAgainOn > until) throw unsound({ lookAgainOn: `This may rest until ${formatDay(until)} at most.` })
  return change(db, actor, finding, version, 'acknowledged', reason, { acknowledgedAt: nowInstant(), acknowledgedBy: actor.userId, acknowledgedReason: reason, lookAgainOn })
}

/** Takes an acknowledgement back: the finding waits for a person again. */
export async function returnFinding(db: Db, actor: Actor, finding: Finding): Promise<FindingView> {
  return change(db, actor, finding, finding.version, 'returned', null, { acknowledgedAt: null, acknowledgedBy: null, acknowledgedReason: null, lookAgainOn: null })
}

interface Rest { acknowledgedAt: string | null, acknowledgedBy: string | null, acknowledgedReason: string | null, lookAgainOn: string | null }

async function change(db: Db, actor: Actor, { id, unitId, organisationId }: Finding, version: number, kind: 'acknowledged' | 'returned', reason: string | null, rest: Rest): Promise<FindingView> {
  await db.transaction().execute(async (trx) => {
    await lockUnit(trx, organisationId, unitId)
    const row = await current(trx, id, version)
    await trx.updateTable('finding').set({ ...rest, version: row.version + 1 }).where('id', '=', id).execute()
    await trx.insertInto('findingEvent').values({
      id: newId(), organisationId, findingId: id, kind, severity: row.severity, evidence: JSON.stringify(row.evidence), reason, actorId: actor.userId, happenedAt: nowInstant(),
    }).execute()
    await appendRecord(trx, actor, { organisationId, unitId, subjectKind: 'finding', subjectId: id, action: `finding ${kind}`, after: { rule: row.rule, severity: row.severity, ...(reason ? { reason, lookAgainOn: rest.lookAgainOn } : {}) } })
    await updateUnitStatus(trx, unitId)
  })
  return findFindingView(db, actor, id)
}

async function current(trx: Trx, id: string, version: number): Promise<Finding> {
  const row = await things.finding(trx, id)
  if (!row || row.version !== version) throw clash(row ?? {})
  if (row.clearedAt) throw problem(409, 'already-cleared', 'This finding has cleared by itself meanwhile.')
  return row
}
