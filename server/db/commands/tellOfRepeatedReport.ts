import type { Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { DangerSign } from '../../../shared/types/mark'
import { repeatedReportMail } from '../../utils/reportMail'
import { findStaff, findUnitPlace } from '../queries/judging'
import { queueMessage } from './queueMessage'

interface RepeatedMark { id: string, organisationId: string, unitId: string, number: number, label: string }

/**
 * Mail to everybody who decides about a report on a known mark. Call it after the mark was judged: where that judgement made
 * something urgent, its own mail has gone out and this one would say the same twice.
 */
export async function tellOfRepeatedReport(trx: Trx, actor: Pick<Actor, 'userId' | 'name'>, mark: RepeatedMark, reportId: string) {
  const report = await trx.selectFrom('observation').select(['number', 'dangerSigns', 'receivedAt']).where('id', '=', reportId).executeTakeFirstOrThrow()
  const told = await trx.selectFrom('findingEvent as e').innerJoin('finding as f', 'f.id', 'e.findingId').select('e.id')
    .where('f.subjectId', '=', mark.id).where('e.happenedAt', '>=', report.receivedAt).where('e.severity', '=', 'urgent').where('e.kind', 'in', ['opened', 'escalated']).limit(1).executeTakeFirst()
  if (told) return
  const dangerSigns = report.dangerSigns as DangerSign[]
  const content = repeatedReportMail({ place: await findUnitPlace(trx, mark.unitId), mark, report: { id: reportId, number: report.number, reporterName: actor.name, dangerSigns } })
  for (const person of await findStaff(trx, mark.organisationId)) {
    if (person.userId === actor.userId) continue
    await queueMessage(trx, {
      organisationId: mark.organisationId, userId: person.userId, kind: 'repeated-report', mailClass: dangerSigns.length > 0 ? 'safety' : 'duty',
      toAddress: person.email, content, dedupeKey: `report:${reportId}:${person.userId}`,
    })
  }
}
