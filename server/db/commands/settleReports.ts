import type { Trx } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import type { Actor } from '../queries/actor'
import { things, type Thing } from '../queries/things'
import { appendRecord } from './appendRecord'
import { judgeMark } from './judgeMark'

/**
 * What a job about a mark does to the reports of it: work done is "started", confirmed work is "corrected".
 * A report with a danger sign is settled only by a job against the danger, and no report by a job that was done before it came.
 */
export async function settleReports(trx: Trx, actor: Actor, job: Thing<'job'>): Promise<void> {
  if (!job.markId || (job.state !== 'done' && job.state !== 'confirmed')) return
  const isAgainstDanger = job.priority === 'danger' || (job.findingId !== null && (await things.finding(trx, job.findingId))?.rule === 'danger-sign')
  const reports = await trx.selectFrom('observation').select(['id', 'receivedAt', 'dangerSigns', 'startedAt', 'correctedAt']).where('markId', '=', job.markId).where('correctedAt', 'is', null).execute()
  const touched = reports.filter(report => (isAgainstDanger || report.dangerSigns.length === 0)
    && (job.doneOn === null || dayIn(actor.timeZone, new Date(report.receivedAt)) <= job.doneOn))
  for (const { id, startedAt } of touched) {
    const at = nowInstant()
    const corrected = job.state === 'confirmed'
    if (!corrected && startedAt) continue
    await trx.updateTable('observation').set({ startedAt: startedAt ?? at, ...(corrected ? { correctedAt: at } : {}) }).where('id', '=', id).execute()
    await appendRecord(trx, actor, {
      organisationId: job.organisationId, unitId: job.unitId, subjectKind: 'observation', subjectId: id, action: corrected ? 'report corrected' : 'work on report started', after: { jobNumber: job.number },
    })
  }
  if (touched.length > 0) await judgeMark(trx, actor, job.markId)
}
