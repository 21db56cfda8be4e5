import type { UnloadingValue, UnloadTrialEndingValue } from '../../../shared/schemas/unloadTrial'
import type { UnloadTrialView } from '../../../shared/types/unloadTrial'
import { formatDay } from '../../../shared/utils/days'
import type { Db, Trx } from '../connect'
import { unsound } from '../../utils/problems'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import { findUnloadTrialView } from '../queries/unloadTrials'
import { takeOut } from './changeItems'
import { editRow } from './editRow'
import { judgeAttic } from './judgeAttic'
import { lockAttic } from './lockAttic'
import { refuseBeforeLastStep } from './lockItem'
import { lockUnit } from './lockUnit'
import { judgeTrialMarks, refuseUnless } from './planUnloadTrial'
import { refuseFuture } from './refuseFuture'

type Trial = Thing<'unloadTrial'>

const recordOf = (trial: Trial, action: string) => ({ organisationId: trial.organisationId, unitId: trial.unitId, subjectKind: 'trial', action })

/** The things are out: each leaves the list with its step of the load history, and everything after that day counts as after. */
export async function carryOutUnloadTrial(db: Db, actor: Actor, trial: Trial, { unloadedOn, itemIds, version }: UnloadingValue): Promise<UnloadTrialView> {
  refuseFuture('unloadedOn', unloadedOn, actor)
  await db.transaction().execute(async (trx) => {
    await lockAttic(trx, { id: trial.atticId, organisationId: trial.organisationId, unitId: trial.unitId })
    await refuseUnless(trx, trial.id, ['planned'])
    await takeOutAll(trx, actor, trial, itemIds, unloadedOn)
    await editRow<Trial>(trx, actor, { table: 'unloadTrial', id: trial.id, version, patch: { state: 'unloaded', unloadedOn }, record: recordOf(trial, 'unload trial carried out') })
    await judgeAttic(trx, actor, trial.atticId)
    await judgeTrialMarks(trx, actor, trial.id)
  })
  return findUnloadTrialView(db, actor, trial.id)
}

/** What was left up there is no part of the trial; what somebody took out earlier stays out as of its own day. */
async function takeOutAll(trx: Trx, actor: Actor, trial: Trial, itemIds: string[], removedOn: string) {
  const items = await trx.selectFrom('atticItem as i').innerJoin('unloadTrialItem as t', 't.itemId', 'i.id').selectAll('i').where('t.trialId', '=', trial.id).execute()
  if (itemIds.some(id => !items.some(item => item.id === id))) throw unsound({ itemIds: 'Choose among the things of this trial.' })
  const left = items.filter(item => !itemIds.includes(item.id)).map(item => item.id)
  if (left.length > 0) await trx.deleteFrom('unloadTrialItem').where('trialId', '=', trial.id).where('itemId', 'in', left).execute()
  for (const item of items) {
    if (!itemIds.includes(item.id) || item.removedOn) continue
    if (removedOn < item.placedOn) throw unsound({ unloadedOn: `${item.name} was put there on ${formatDay(item.placedOn)}. Give that day or a later one.` })
    await refuseBeforeLastStep(trx, 'unloadedOn', removedOn, item.id)
    await takeOut(trx, actor, item, { removedOn, version: item.version })
  }
}

/** Ends a trial: after the unloading with what was learnt, before it as given up. */
export async function endUnloadTrial(db: Db, actor: Actor, trial: Trial, { endedOn, conclusion, version }: UnloadTrialEndingValue): Promise<UnloadTrialView> {
  refuseFuture('endedOn', endedOn, actor)
  await db.transaction().execute(async (trx) => {
    await lockUnit(trx, trial.organisationId, trial.unitId)
    const now = await refuseUnless(trx, trial.id, ['planned', 'unloaded'])
    if (now.unloadedOn && endedOn < now.unloadedOn) throw unsound({ endedOn: 'That is before the unloading.' })
    await editRow<Trial>(trx, actor, {
      table: 'unloadTrial', id: trial.id, version, patch: { state: now.state === 'unloaded' ? 'ended' : 'given-up', endedOn, conclusion },
      record: recordOf(trial, now.state === 'unloaded' ? 'unload trial ended' : 'unload trial given up'),
    })
    await judgeTrialMarks(trx, actor, trial.id)
  })
  return findUnloadTrialView(db, actor, trial.id)
}
