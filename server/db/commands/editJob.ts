import type { JobChanges } from '../../../shared/schemas/job'
import type { JobView } from '../../../shared/types/job'
import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import { findJobView } from '../queries/jobs'
import type { Thing } from '../queries/things'
import { unsound } from '../../utils/problems'
import { checkAssignee, tellAssignee } from './assignJob'
import { editRow } from './editRow'
import { judgeUnit } from './judgeUnit'

export async function editJob(db: Db, actor: Actor, { id, organisationId, unitId, state }: Thing<'job'>, { version, ...patch }: JobChanges): Promise<JobView> {
  if (state === 'scheduled' && patch.scheduledOn === null) throw unsound({ scheduledOn: 'This job has a day. Put it back to planned to take the day away.' })
  await db.transaction().execute(async (trx) => {
    await checkAssignee(trx, actor, patch.assigneeUserId)
    const job = await editRow<Thing<'job'>>(trx, actor, { table: 'job', id, version, patch, record: { organisationId, unitId, subjectKind: 'job', action: 'job changed' } })
    if (patch.assigneeUserId) await tellAssignee(trx, actor, job)
    await judgeUnit(trx, actor, unitId)
  })
  return findJobView(db, actor, id)
}
