import { sql } from 'kysely'
import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { MarkJoiningValue } from '../../../shared/schemas/mark'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { clash, notFound, problem, unsound } from '../../utils/problems'
import { appendRecords, type RecordChange } from './appendRecord'
import { judgeMark } from './judgeMark'
import { lockUnit } from './lockUnit'
import type { FollowedMark } from './openMark'
import { placeInSegments } from './placeInSegments'

/** Everything that hangs on a mark and goes along with it. */
export const MARK_PARTS = ['reading', 'observation', 'photo', 'job', 'mark_repair'] as const

/**
 * Two marks that are one: everything of the first goes over to the second and is listed, so that it can go back.
 * The first stays with its page, closed, and says where it went.
 */
export async function joinMarks(db: Db, actor: Actor, mark: FollowedMark, { version, intoId, reason }: MarkJoiningValue): Promise<FollowedMark> {
  return db.transaction().execute(async (trx) => {
    await lockUnit(trx, mark.organisationId, mark.unitId)
    const from = await lockMark(trx, mark.id)
    if (from.version !== version) throw clash(from)
    const into = await checkTarget(trx, from, intoId)
    await refuseWatched(trx, from)
    const joining = { id: newId(), organisationId: from.organisationId, markId: from.id, intoId, reason, stateBefore: from.state, joinedBy: actor.userId, joinedAt: nowInstant() }
    await trx.insertInto('markJoining').values(joining).execute()
    for (const kind of MARK_PARTS) await moveParts(trx, joining, kind)
    await trx.updateTable('mark').set({ state: 'closed', joinedInto: intoId, version: sql`version + 1` }).where('id', '=', from.id).execute()
    await trx.updateTable('mark').set({ stainState: wetter(from, into), version: sql`version + 1` }).where('id', '=', intoId).execute()
    await placeInSegments(trx, intoId)
    await appendRecords(trx, actor, both(from, into, 'marks joined', { reason, mark: from.number, into: into.number, joiningId: joining.id }))
    for (const id of [from.id, intoId]) await judgeMark(trx, actor, id)
    return lockMark(trx, from.id)
  })
}

/** Takes a joining back: what came over goes home, what was added since stays where it was added. */
export async function undoJoining(db: Db, actor: Actor, mark: FollowedMark): Promise<FollowedMark> {
  return db.transaction().execute(async (trx) => {
    await lockUnit(trx, mark.organisationId, mark.unitId)
    const joining = await trx.selectFrom('markJoining').selectAll().where('markId', '=', mark.id).where('undoneAt', 'is', null).forUpdate().executeTakeFirst()
    if (!joining) throw problem(409, 'not-joined', 'This mark is not joined into another one.')
    const into = await lockMark(trx, joining.intoId)
    if (into.joinedInto) throw problem(409, 'joined-further', `It was joined into mark ${into.number}, which was then joined into another one. Undo that first.`)
    for (const kind of MARK_PARTS) {
      await sql`update ${sql.table(kind)} set mark_id = ${mark.id} where mark_id = ${into.id} and id in
        (select part_id from mark_joining_part where joining_id = ${joining.id} and kind = ${kind})`.execute(trx)
    }
    await trx.updateTable('markJoining').set({ undoneAt: nowInstant(), undoneBy: actor.userId }).where('id', '=', joining.id).execute()
    await trx.updateTable('mark').set({ state: joining.stateBefore, joinedInto: null, version: sql`version + 1` }).where('id', '=', mark.id).execute()
    await trx.updateTable('mark').set({ version: sql`version + 1` }).where('id', '=', into.id).execute()
    for (const id of [mark.id, into.id]) await placeInSegments(trx, id)
    await appendRecords(trx, actor, both(mark, into, 'joining undone', { mark: mark.number, into: into.number, joiningId: joining.id }))
    for (const id of [mark.id, into.id]) await judgeMark(trx, actor, id)
    return lockMark(trx, mark.id)
  })
}

export async function lockMark(trx: Trx, id: string): Promise<FollowedMark> {
  const mark = await trx.selectFrom('mark').selectAll().where('id', '=', id).forUpdate().executeTakeFirst()
  if (!mark) throw notFound()
  return mark
}

async function checkTarget(trx: Trx, from: FollowedMark, intoId: string): Promise<FollowedMark> {
  if (from.joinedInto) throw problem(409, 'mark-joined', 'This mark counts as part of another one already.')
  const into = await trx.selectFrom('mark').selectAll().where('id', '=', intoId).where('unitId', '=', from.unitId).forUpdate().executeTakeFirst()
  if (!into || into.id === from.id) throw unsound({ intoId: 'Choose another mark of this home.' })
  if (into.kind !== from.kind) throw unsound({ intoId: 'That mark is of another kind: their readings do not measure the same.' })
  if (into.state === 'closed') throw unsound({ intoId: 'That mark is closed. Open it again first.' })
  return into
}

/** An unload trial compares the readings of a mark before and after: they cannot go elsewhere meanwhile. */
export async function refuseWatched(trx: Trx, mark: FollowedMark) {
  const watched = await trx.selectFrom('unloadTrialMark as t').innerJoin('unloadTrial as u', 'u.id', 't.trialId').select('t.trialId')
    .where('t.markId', '=', mark.id).where('u.state', 'in', ['planned', 'unloaded']).limit(1).executeTakeFirst()
  if (watched) throw problem(409, 'trial-runs', 'An unload trial is watching this mark. End the trial first.')
}

async function moveParts(trx: Trx, joining: { id: string, organisationId: string, markId: string, intoId: string }, kind: typeof MARK_PARTS[number]) {
  await sql`with moved as (update ${sql.table(kind)} set mark_id = ${joining.intoId} where mark_id = ${joining.markId} returning id)
    insert into mark_joining_part (joining_id, organisation_id, kind, part_id) select ${joining.id}, ${joining.organisationId}, ${kind}, id from moved`.execute(trx)
}

const WETNESS = [null, 'dry', 'damp', 'dripping'] as const
const wetter = (one: FollowedMark, other: FollowedMark) => WETNESS.indexOf(one.stainState) > WETNESS.indexOf(other.stainState) ? one.stainState : other.stainState

const both = (from: FollowedMark, into: FollowedMark, action: string, after: object): RecordChange[] =>
  [from, into].map(({ id, organisationId, unitId }) => ({ organisationId, unitId, subjectKind: 'mark' as const, subjectId: id, action, after }))
