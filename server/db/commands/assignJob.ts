import type { Trx } from '../connect'
import { assignedJobMail } from '../../utils/jobMail'
import { unsound } from '../../utils/problems'
import type { Actor } from '../queries/actor'
import { findAssignee } from '../queries/jobs'
import { findUnitPlace } from '../queries/judging'
import type { Thing } from '../queries/things'
import { queueMessage } from './queueMessage'

/** 422 unless this person does jobs here. */
export async function checkAssignee(trx: Trx, actor: Actor, userId: string | null | undefined) {
  if (userId && !await findAssignee(trx, actor.organisationId, userId)) throw unsound({ assigneeUserId: 'Choose somebody who does jobs for you.' })
}

/** Tells whoever was given the job, once a job and person; nobody is told of what they gave themselves. */
export async function tellAssignee(trx: Trx, actor: Actor, job: Thing<'job'>): Promise<void> {
  if (!job.assigneeUserId || job.assigneeUserId === actor.userId) return
  const person = await findAssignee(trx, job.organisationId, job.assigneeUserId)
  if (!person) return
  const place = await findUnitPlace(trx, job.unitId)
  await queueMessage(trx, {
    organisationId: job.organisationId, userId: person.userId, kind: 'job-assigned', mailClass: 'duty', toAddress: person.email,
    content: assignedJobMail({ ...job, yearBuilt: place.yearBuilt }, place),
    dedupeKey: `job-assigned:${job.id}:${person.userId}`,
  })
}
