import type { StoredFinding } from '../../../shared/types/finding'
import { correctBy, responseClassOf } from '../../../shared/utils/upkeep/responseTimes'
import type { Db } from '../connect'
import { now } from '../../utils/clock'
import { isLifeSafety, unansweredMail } from '../../utils/findingMail'
import { findWaitingFindings, type WaitingFinding } from '../queries/digest'
import { findStaff, findUnitPlace } from '../queries/judging'
import { queueMessage } from './queueMessage'

interface Policy { id: string, dangerResponseHours: number, urgentResponseHours: number, routineResponseDays: number, entryNoticeHours: number }

/** Urgent findings nobody has answered within the organisation's own time, with no job for them: every owner is told once, manager's silence or not. */
export async function escalateUnanswered(db: Db, organisation: Policy): Promise<number> {
  const late = (await findWaitingFindings(db, organisation.id)).filter(entry => entry.finding.severity === 'urgent' && isPastDue(entry, organisation))
  const jobless = await withoutJobs(db, late)
  const owners = (await findStaff(db, organisation.id)).filter(person => person.role === 'owner')
  let told = 0
  for (const { id, unitId, finding } of jobless) {
    await db.transaction().execute(async (trx) => {
      const place = await findUnitPlace(trx, unitId)
      const mailClass = isLifeSafety(finding) ? 'safety' : 'duty'
      for (const owner of owners) {
        const queued = await queueMessage(trx, {
          organisationId: organisation.id, userId: owner.userId, kind: 'unanswered-finding', mailClass, toAddress: owner.email,
          content: unansweredMail({ place, findings: [{ findingId: id, finding }], mailClass, system: owner.unitsOfMeasure, openedAt: finding.openedAt }),
          dedupeKey: `unanswered:${id}:${owner.userId}`,
        })
        if (queued) told += 1
      }
    })
  }
  return told
}

function isPastDue({ finding }: WaitingFinding, policy: Policy): boolean {
  const hours = { danger: policy.dangerResponseHours, urgent: policy.urgentResponseHours, routine: policy.routineResponseDays * 24 }
  return correctBy(responseClassOf(finding), finding.openedAt, { hours, entryNoticeHours: policy.entryNoticeHours }) < now().toISOString()
}

async function withoutJobs(db: Db, entries: (WaitingFinding & { finding: StoredFinding })[]) {
  if (entries.length === 0) return []
  const jobs = await db.selectFrom('job').select('findingId').where('findingId', 'in', entries.map(entry => entry.id)).where('state', '!=', 'cancelled').execute()
  return entries.filter(entry => !jobs.some(job => job.findingId === entry.id))
}
