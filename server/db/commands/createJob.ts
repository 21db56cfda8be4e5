import type { NewJob } from '../../../shared/schemas/job'
import type { JobView } from '../../../shared/types/job'
import { correctBy } from '../../../shared/utils/upkeep/responseTimes'
import type { Db, Trx } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { unsound } from '../../utils/problems'
import type { Actor } from '../queries/actor'
import { findJobView } from '../queries/jobs'
import { findResponsePolicy } from '../queries/organisations'
import { things } from '../queries/things'
import { appendRecord } from './appendRecord'
import { checkAssignee, tellAssignee } from './assignJob'
import { judgeUnit } from './judgeUnit'
import { takeNumber } from './takeNumber'

/** Plans a job; without a day it is due by the organisation's response time, counted from when the cause was known. */
export async function createJob(db: Db, actor: Actor, input: NewJob): Promise<JobView> {
  const id = await db.transaction().execute(async (trx) => {
    const unit = await things.unit(trx, input.unitId)
    if (!unit || unit.organisationId !== actor.organisationId || unit.archivedAt) throw unsound({ unitId: 'Choose one of your homes.' })
    await checkAssignee(trx, actor, input.assigneeUserId)
    const cause = await causeOf(trx, input)
    const row = {
      ...input, ...cause.subject, id: newId(), organisationId: actor.organisationId,
      number: await takeNumber(trx, actor.organisationId),
      state: input.scheduledOn ? 'scheduled' as const : 'planned' as const,
      dueOn: input.dueOn ?? dayIn(actor.timeZone, new Date(correctBy(input.priority, cause.knownAt, await findResponsePolicy(trx, actor.organisationId)))),
      doneOn: null, outcome: null, costCents: null, createdBy: actor.userId, createdAt: nowInstant(),
    }
    const job = await trx.insertInto('job').values(row).returningAll().executeTakeFirstOrThrow()
    const { title, priority, dueOn, scheduledOn, assigneeUserId, number } = job
    await appendRecord(trx, actor, { organisationId: job.organisationId, unitId: job.unitId, subjectKind: 'job', subjectId: job.id, action: 'job planned', after: { number, title, priority, dueOn, scheduledOn, assigneeUserId } })
    await tellAssignee(trx, actor, job)
    await judgeUnit(trx, actor, job.unitId)
    return job.id
  })
  return findJobView(db, actor, id)
}

interface Cause { subject: { findingId: string | null, markId: string | null, atticId: string | null }, knownAt: string }

/** What the job is about must be in the same home; a finding brings its mark or attic along, and starts the clock. */
async function causeOf(trx: Trx, { unitId, findingId, markId, atticId }: NewJob): Promise<Cause> {
  const finding = findingId ? await things.finding(trx, findingId) : undefined
  if (findingId && finding?.unitId !== unitId) throw unsound({ findingId: 'That finding is not of this home.' })
  const mark = markId ? await things.mark(trx, markId) : undefined
  if (markId && mark?.unitId !== unitId) throw unsound({ markId: 'That mark is not in this home.' })
  const attic = atticId ? await things.attic(trx, atticId) : undefined
  if (atticId && attic?.unitId !== unitId) throw unsound({ atticId: 'That attic is not in this home.' })
  return {
    subject: {
      findingId,
      markId: markId ?? (finding?.subjectKind === 'mark' ? finding.subjectId : null),
      atticId: atticId ?? (finding?.subjectKind === 'attic' ? finding.subjectId : null),
    },
    knownAt: finding?.openedAt ?? nowInstant(),
  }
}
