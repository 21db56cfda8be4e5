import type { JobMove } from '../../../shared/schemas/job'
import type { JobView } from '../../../shared/types/job'
import { JOB_MOVE_WORDS, JOB_STATE_WORDS } from '../../../shared/utils/messages/jobMessages'
import { jobMovesFor } from '../../../shared/utils/upkeep/jobStates'
import type { Db } from '../connect'
import { dayIn } from '../../utils/clock'
import { notAllowed, problem, unsound } from '../../utils/problems'
import { reachOf } from '../../utils/policy'
import type { Actor } from '../queries/actor'
import { findJobView } from '../queries/jobs'
import type { Thing } from '../queries/things'
import { editRow } from './editRow'
import { judgeUnit } from './judgeUnit'
import { settleReports } from './settleReports'

type Job = Thing<'job'>

/** planned → scheduled → done → confirmed, or cancelled. An impossible change is refused with those that are possible. */
export async function moveJob(db: Db, actor: Actor, job: Job, move: JobMove): Promise<JobView> {
  if (move.version === job.version) checkMove(actor, job, move)
  const patch = patchFor(job, move, dayIn(actor.timeZone))
  await db.transaction().execute(async (trx) => {
    const after = await editRow<Job>(trx, actor, {
      table: 'job', id: job.id, version: move.version, patch,
      record: { organisationId: job.organisationId, unitId: job.unitId, subjectKind: 'job', action: `job ${move.to}` },
    })
    await settleReports(trx, actor, after)
    await judgeUnit(trx, actor, job.unitId)
  })
  return findJobView(db, actor, job.id)
}

function checkMove(actor: Actor, job: Job, { to }: JobMove) {
  const manages = reachOf(actor.role, 'edit job') !== undefined
  const allowed = jobMovesFor(job.state, manages)
  if (allowed.includes(to)) return
  if (jobMovesFor(job.state, true).includes(to)) throw notAllowed()
  const words = allowed.length > 0 ? `Possible now: ${allowed.map(state => JOB_MOVE_WORDS[state].toLowerCase()).join(', ')}.` : 'Nothing more can be changed about its state.'
  throw problem(409, 'impossible-change', `This job is at “${JOB_STATE_WORDS[job.state].toLowerCase()}”. ${words}`, { allowed })
}

function patchFor(job: Job, move: JobMove, today: string) {
  const common = { state: move.to, outcome: move.outcome ?? undefined, costCents: move.costCents ?? undefined }
  switch (move.to) {
    case 'scheduled': {
      const scheduledOn = move.scheduledOn ?? job.scheduledOn
      if (!scheduledOn) throw unsound({ scheduledOn: 'On which day will it be done?' })
      return { ...common, scheduledOn, doneOn: null }
    }
    case 'done': {
      const doneOn = move.doneOn ?? today
      if (doneOn > today) throw unsound({ doneOn: 'That day is still to come. Set it as the planned day instead.' })
      return { ...common, doneOn }
    }
    case 'cancelled':
      if (!move.outcome) throw unsound({ outcome: 'Why is it cancelled? A few words are enough.' })
      return { ...common, doneOn: null }
    case 'planned':
      return { ...common, scheduledOn: null, doneOn: null }
    case 'confirmed':
      return common
  }
}
