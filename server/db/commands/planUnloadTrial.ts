import type { UnloadTrialEditValue, UnloadTrialValue } from '../../../shared/schemas/unloadTrial'
import type { UnloadTrialView } from '../../../shared/types/unloadTrial'
import type { Db, Trx } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { problem, unsound } from '../../utils/problems'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import { findUnloadTrialView } from '../queries/unloadTrials'
import { appendRecord } from './appendRecord'
import { editRow } from './editRow'
import { judgeMark } from './judgeMark'
import { lockAttic, type AtticRef } from './lockAttic'

type Trial = Thing<'unloadTrial'>

/** Marks an unloading that is to come as an experiment: which things, on which day, and which marks are watched. One runs in an attic at a time. */
export async function planUnloadTrial(db: Db, actor: Actor, attic: AtticRef, input: UnloadTrialValue): Promise<UnloadTrialView> {
  const { itemIds, markIds, purpose, plannedOn } = input
  const id = newId()
  await db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    await checkPlan(trx, actor, attic, input)
    const running = await trx.selectFrom('unloadTrial').select('id').where('atticId', '=', attic.id).where('state', 'in', ['planned', 'unloaded']).executeTakeFirst()
    if (running) throw problem(409, 'trial-runs', 'A trial is under way in this attic. End it first: two at a time could not be told apart.', { trialId: running.id })
    await trx.insertInto('unloadTrial').values({
      id, organisationId: attic.organisationId, unitId: attic.unitId, atticId: attic.id, purpose, plannedOn, unloadedOn: null, endedOn: null, createdBy: actor.userId, createdAt: nowInstant(),
    }).execute()
    await writeChoice(trx, { id, organisationId: attic.organisationId }, input)
    await judgeMarks(trx, actor, markIds)
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'trial', subjectId: id, action: 'unload trial planned', after: { atticId: attic.id, purpose, plannedOn, itemIds, markIds },
    })
  })
  return findUnloadTrialView(db, actor, id)
}

/** Changes a plan that has not been carried out yet. */
export async function editUnloadTrial(db: Db, actor: Actor, trial: Trial, { version, itemIds, markIds, ...patch }: UnloadTrialEditValue): Promise<UnloadTrialView> {
  await db.transaction().execute(async (trx) => {
    const attic = { id: trial.atticId, organisationId: trial.organisationId, unitId: trial.unitId }
    await lockAttic(trx, attic)
    await refuseUnless(trx, trial.id, ['planned'])
    await checkPlan(trx, actor, attic, { ...patch, itemIds, markIds }, trial.plannedOn)
    const { version: now } = await editRow<Trial>(trx, actor, {
      table: 'unloadTrial', id: trial.id, version, patch, record: { organisationId: trial.organisationId, unitId: trial.unitId, subjectKind: 'trial', action: 'unload trial changed' },
    })
    const chosen = await choiceOf(trx, trial.id)
    const isSame = (a: string[], b: string[]) => [...a].sort().join() === [...b].sort().join()
    if (isSame(chosen.itemIds, itemIds) && isSame(chosen.markIds, markIds)) return
    await writeChoice(trx, trial, { itemIds, markIds })
    await judgeMarks(trx, actor, [...new Set([...chosen.markIds, ...markIds])])
    await trx.updateTable('unloadTrial').set({ version: now + 1 }).where('id', '=', trial.id).execute()
    await appendRecord(trx, actor, {
      organisationId: trial.organisationId, unitId: trial.unitId, subjectKind: 'trial', subjectId: trial.id, action: 'unload trial changed', before: chosen, after: { itemIds, markIds },
    })
  })
  return findUnloadTrialView(db, actor, trial.id)
}

/** The trial as it stands now, with the unit's lock held by the caller. */
export async function refuseUnless(trx: Trx, trialId: string, states: Trial['state'][]): Promise<Trial> {
  const now = await trx.selectFrom('unloadTrial').selectAll().where('id', '=', trialId).executeTakeFirstOrThrow()
  if (!states.includes(now.state)) throw problem(409, 'state-does-not-allow', STATE_REFUSALS[now.state])
  return now
}

const STATE_REFUSALS: Record<Trial['state'], string> = {
  'planned': 'Nothing has been taken out in this trial yet.',
  'unloaded': 'The things of this trial have been taken out already.',
  'ended': 'This trial has ended.',
  'given-up': 'This trial was given up.',
}

type Plan = Pick<UnloadTrialValue, 'plannedOn' | 'itemIds' | 'markIds'>

async function checkPlan(trx: Trx, actor: Actor, attic: AtticRef, { plannedOn, itemIds, markIds }: Plan, plannedBefore?: string) {
  if (plannedOn !== plannedBefore && plannedOn < dayIn(actor.timeZone)) throw unsound({ plannedOn: 'That day is past. Choose today or a later day.' })
  const items = await trx.selectFrom('atticItem').select('id').where('id', 'in', itemIds).where('atticId', '=', attic.id).where('removedOn', 'is', null).execute()
  if (items.length < itemIds.length) throw unsound({ itemIds: 'Choose things that are in this attic now.' })
  const marks = await trx.selectFrom('mark').select('id').where('id', 'in', markIds).where('unitId', '=', attic.unitId).where('state', '!=', 'closed').execute()
  if (marks.length < markIds.length) throw unsound({ markIds: 'Choose marks of this home that are not closed.' })
}

/** Marks of a trial are read oftener: their next reading changes as they come under it and leave it. */
async function judgeMarks(trx: Trx, actor: Actor, markIds: readonly string[]) {
  for (const id of [...markIds].sort()) await judgeMark(trx, actor, id)
}

export const judgeTrialMarks = async (trx: Trx, actor: Actor, trialId: string) => judgeMarks(trx, actor, (await choiceOf(trx, trialId)).markIds)

async function choiceOf(trx: Trx, trialId: string) {
  const items = await trx.selectFrom('unloadTrialItem').select('itemId').where('trialId', '=', trialId).execute()
  const marks = await trx.selectFrom('unloadTrialMark').select('markId').where('trialId', '=', trialId).execute()
  return { itemIds: items.map(row => row.itemId), markIds: marks.map(row => row.markId) }
}

async function writeChoice(trx: Trx, { id, organisationId }: { id: string, organisationId: string }, { itemIds, markIds }: Pick<Plan, 'itemIds' | 'markIds'>) {
  await trx.deleteFrom('unloadTrialItem').where('trialId', '=', id).execute()
  await trx.deleteFrom('unloadTrialMark').where('trialId', '=', id).execute()
  await trx.insertInto('unloadTrialItem').values(itemIds.map(itemId => ({ trialId: id, organisationId, itemId }))).execute()
  await trx.insertInto('unloadTrialMark').values(markIds.map(markId => ({ trialId: id, organisationId, markId }))).execute()
}
