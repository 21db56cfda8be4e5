import type { HindsightValue } from '../../../shared/schemas/hindsight'
import type { HindsightRow } from '../../../shared/types/hindsight'
import type { Db } from '../connect'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import type { Actor } from '../queries/actor'
import { listHindsight } from '../queries/ledger'
import type { Thing } from '../queries/things'
import { appendRecord } from './appendRecord'
import { lockUnit } from './lockUnit'

/** Says of a finding, later, that it was right or wrong. It changes nothing of the finding; saying the same twice is said once. */
export async function judgeHindsight(db: Db, actor: Actor, finding: Thing<'finding'>, { outcome, reason }: HindsightValue): Promise<{ rows: HindsightRow[] }> {
  await db.transaction().execute(async (trx) => {
    await lockUnit(trx, finding.organisationId, finding.unitId)
    const [last] = await listHindsight(trx, finding.id)
    if (last?.outcome === outcome && last.reason === reason) return
    await trx.insertInto('findingHindsight').values({
      id: newId(), organisationId: finding.organisationId, findingId: finding.id, outcome, reason, judgedBy: actor.userId, judgedAt: nowInstant(),
    }).execute()
    await appendRecord(trx, actor, {
      organisationId: finding.organisationId, unitId: finding.unitId, subjectKind: 'finding', subjectId: finding.id, action: `finding judged ${outcome}`,
      before: last ? { outcome: last.outcome, reason: last.reason } : null, after: { rule: finding.rule, outcome, reason },
    })
  })
  return { rows: await listHindsight(db, finding.id) }
}
