import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import type { Receipt } from '../../../shared/types/receipt'
import type { ReportStepValue } from '../../../shared/schemas/reportStep'
import { nowInstant } from '../../utils/clock'
import { notFound, problem } from '../../utils/problems'
import { findReceipt } from '../queries/observations'
import { appendRecord } from './appendRecord'
import { judgeMark } from './judgeMark'
import { lockUnit } from './lockUnit'

interface Report { id: string, organisationId: string, unitId: string, markId: string }

/** 'Started' and 'corrected' are two instants of the server's clock; each is set once. Correcting ends its danger signs. */
export async function moveReport(db: Db, actor: Actor, report: Report, { step, note }: ReportStepValue): Promise<Receipt> {
  await db.transaction().execute(async (trx) => {
    await lockUnit(trx, report.organisationId, report.unitId)
    const before = await trx.selectFrom('observation').select(['number', 'startedAt', 'correctedAt']).where('id', '=', report.id).forUpdate().executeTakeFirst()
    if (!before) throw notFound()
    if (before.correctedAt || (step === 'started' && before.startedAt)) throw problem(409, 'already-done', step === 'started' ? 'Work on this report had started already.' : 'This report was put right already.')
    const at = nowInstant()
    const after = step === 'started' ? { startedAt: at } : { startedAt: before.startedAt ?? at, correctedAt: at }
    await trx.updateTable('observation').set(after).where('id', '=', report.id).execute()
    await appendRecord(trx, actor, {
      organisationId: report.organisationId, unitId: report.unitId, subjectKind: 'observation', subjectId: report.id,
      action: step === 'started' ? 'work on report started' : 'report put right', before, after: { ...after, number: before.number, note },
    })
    await judgeMark(trx, actor, report.markId)
  })
  const receipt = await findReceipt(db, report.id)
  if (!receipt) throw notFound()
  return receipt
}
