import { sql } from 'kysely'
import type { UnloadTrialsFilter } from '../../../shared/schemas/unloadTrial'
import type { Page } from '../../../shared/types/home'
import type { TrialItem, TrialMark, UnloadTrialRow, UnloadTrialView } from '../../../shared/types/unloadTrial'
import { groupByKey } from '../../../shared/utils/groupByKey'
import { unloadTrialResult } from '../../../shared/utils/movement/unloadTrial'
import type { Db } from '../connect'
import { dayIn } from '../../utils/clock'
import { pageOf, readCursor } from '../../utils/cursor'
import { abilitiesOf } from '../../utils/policy'
import { visibleUnits, type Actor } from './actor'

const fromTrials = (db: Db) =>
  db.selectFrom('unloadTrial as t').innerJoin('attic as a', 'a.id', 't.atticId').innerJoin('unit as u', 'u.id', 't.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
    .select([
      't.id', 't.version', 't.atticId', 'a.name as atticName', 't.unitId', 'u.name as unitName', 'p.name as propertyName', 't.state', 't.purpose', 't.plannedOn', 't.unloadedOn', 't.endedOn',
      sql<number>`(select coalesce(sum(i.quantity * i.typical_lb), 0) from unload_trial_item ti join attic_item i on i.id = ti.item_id where ti.trial_id = t.id)`.as('weightLb'),
      sql<number>`(select count(*) from unload_trial_mark tm where tm.trial_id = t.id)`.as('markCount'),
    ])

/** Trials within the asker's sight, newest first; keyset-paged. */
export async function listUnloadTrials(db: Db, actor: Actor, { state, attic, after, limit }: UnloadTrialsFilter): Promise<Page<UnloadTrialRow>> {
  const from = readCursor(after, ['text', 'id'])
  const units = visibleUnits(actor)
  const rows = await fromTrials(db).select('t.createdAt').where('t.organisationId', '=', actor.organisationId)
    .$if(units !== 'all', query => query.where('t.unitId', '=', sql<string>`any(${units}::uuid[])`))
    .$if(state !== undefined, query => query.where('t.state', '=', state!))
    .$if(attic !== undefined, query => query.where('t.atticId', '=', attic!))
    .$if(from !== undefined, query => query.where(sql<boolean>`(t.created_at, t.id) < (${from![0]}::timestamptz, ${from![1]}::uuid)`))
    .orderBy('t.createdAt', 'desc').orderBy('t.id', 'desc').limit(limit + 1).execute()
  const page = pageOf(rows, limit, row => [row.createdAt, row.id])
  return { ...page, rows: page.rows.map(({ createdAt: _, ...row }) => row) }
}

const listTrialItems = (db: Db, trialId: string): Promise<TrialItem[]> =>
  db.selectFrom('unloadTrialItem as t').innerJoin('atticItem as i', 'i.id', 't.itemId')
    .select(['i.id', 'i.name', sql<number>`i.quantity * i.typical_lb`.as('weightLb'), 'i.removedOn']).where('t.trialId', '=', trialId).orderBy('i.name').orderBy('i.id').execute()

/** The watched marks; one that was joined to another since is followed there. */
const findWatchedMarks = (db: Db, trialId: string) =>
  db.selectFrom('unloadTrialMark as t').innerJoin('mark as k', 'k.id', 't.markId')
    .innerJoin('mark as m', join => join.on('m.id', '=', eb => eb.fn.coalesce('k.joinedInto', 'k.id'))).innerJoin('room as r', 'r.id', 'm.roomId')
    .select(['m.id', 'm.number', 'm.label', 'm.kind', 'r.name as roomName']).distinct().where('t.trialId', '=', trialId).orderBy('m.number').execute()

/** The readings of a mark's newest segment up to the end of the trial: a repair ends what can be compared. */
async function listTrialMarks(db: Db, trial: { id: string, unloadedOn: string | null, endedOn: string | null }): Promise<TrialMark[]> {
  const marks = await findWatchedMarks(db, trial.id)
  const readings = await db.selectFrom('reading as r').innerJoin('mark as m', join => join.onRef('m.id', '=', 'r.markId').onRef('m.segment', '=', 'r.segment'))
    .select(['r.markId', 'r.takenOn', sql<number>`r.value`.as('value'), sql<number>`r.sigma`.as('sigma')])
    .where('r.markId', '=', sql<string>`any(${marks.map(mark => mark.id)}::uuid[])`).where('r.value', 'is not', null)
    .$if(trial.endedOn !== null, query => query.where('r.takenOn', '<=', trial.endedOn!)).orderBy('r.takenOn').execute()
  const byMark = groupByKey(readings, reading => reading.markId)
  return marks.map(mark => ({ ...mark, result: unloadTrialResult(byMark.get(mark.id) ?? [], trial.unloadedOn) }))
}

const isUnloadingUrgent = async (db: Db, trial: { id: string, atticId: string }): Promise<boolean> => {
  const { rows: [row] } = await sql<{ urgent: boolean }>`select
    exists (select from attic_status s where s.attic_id = ${trial.atticId} and s.load_state in ('over', 'hold') and s.stored_lb > 0)
    or exists (select from finding f where f.cleared_at is null and f.severity = 'urgent'
      and (f.subject_id = ${trial.atticId} or f.subject_id in (select mark_id from unload_trial_mark where trial_id = ${trial.id}))) as urgent`.execute(db)
  return row!.urgent
}

/** One trial with what is taken out and how each watched mark moved before and after. */
export async function findUnloadTrialView(db: Db, actor: Actor, trialId: string): Promise<UnloadTrialView> {
  const trial = await fromTrials(db).innerJoin('appUser as w', 'w.id', 't.createdBy').select(['t.conclusion', 'w.name as createdByName', 't.createdAt']).where('t.id', '=', trialId).executeTakeFirstOrThrow()
  const waits = trial.state === 'planned'
  return {
    ...trial, items: await listTrialItems(db, trialId), marks: await listTrialMarks(db, trial),
    unloadNow: waits && await isUnloadingUrgent(db, trial), abilities: abilitiesOf(actor.role), today: dayIn(actor.timeZone),
  }
}
