import { sql } from 'kysely'
import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { MarkSplitValue } from '../../../shared/schemas/mark'
import { dayIn } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { clash, problem, unsound } from '../../utils/problems'
import { appendRecord } from './appendRecord'
import { judgeMark } from './judgeMark'
import { lockMark, refuseWatched } from './joinMarks'
import { lockUnit } from './lockUnit'
import { openMark, type FollowedMark } from './openMark'
import { placeInSegments } from './placeInSegments'

/** One mark that is really two: the chosen readings and reports, with their photos, become a mark of their own. Joining takes it back. */
export async function splitMark(db: Db, actor: Actor, mark: FollowedMark, body: MarkSplitValue): Promise<FollowedMark> {
  return db.transaction().execute(async (trx) => {
    await lockUnit(trx, mark.organisationId, mark.unitId)
    const from = await lockMark(trx, mark.id)
    if (from.version !== body.version) throw clash(from)
    if (from.joinedInto) throw problem(409, 'mark-joined', 'This mark counts as part of another one. Split that one.')
    await refuseWatched(trx, from)
    await checkParts(trx, from, body)
    const made = await openSecond(trx, actor, from, body)
    await moveChosen(trx, from.id, made.id, body)
    await keepRepairs(trx, from.id, made.id)
    for (const id of [from.id, made.id]) await placeInSegments(trx, id)
    await trx.updateTable('mark').set({ version: sql`version + 1` }).where('id', '=', from.id).execute()
    await appendRecord(trx, actor, {
      organisationId: from.organisationId, unitId: from.unitId, subjectKind: 'mark', subjectId: from.id, action: 'mark split',
      after: { reason: body.reason, newMark: made.number, newMarkId: made.id, readingIds: body.readingIds, observationIds: body.observationIds },
    })
    for (const id of [from.id, made.id]) await judgeMark(trx, actor, id)
    return lockMark(trx, made.id)
  })
}

/** All of them are this mark's, and something stays behind. */
async function checkParts(trx: Trx, { id }: FollowedMark, { readingIds, observationIds }: MarkSplitValue) {
  const readings = await trx.selectFrom('reading').select('id').where('markId', '=', id).execute()
  const reports = await trx.selectFrom('observation').select('id').where('markId', '=', id).execute()
  const has = (rows: { id: string }[], ids: string[]) => ids.every(one => rows.some(row => row.id === one))
  if (!has(readings, readingIds)) throw unsound({ readingIds: 'One of these readings is not of this mark.' })
  if (!has(reports, observationIds)) throw unsound({ observationIds: 'One of these reports is not of this mark.' })
  if (readings.length + reports.length === readingIds.length + observationIds.length) throw unsound({ readingIds: 'Something has to stay with this mark. To rename it, change its facts.' })
}

async function openSecond(trx: Trx, actor: Actor, from: FollowedMark, { label, pin, roomId, readingIds }: MarkSplitValue): Promise<FollowedMark> {
  const room = await trx.selectFrom('room').select(['id', 'name']).where('id', '=', roomId).where('unitId', '=', from.unitId).where('archivedAt', 'is', null).executeTakeFirst()
  if (!room) throw unsound({ roomId: 'Choose a room of this home.' })
  const first = readingIds.length === 0 ? undefined : await trx.selectFrom('reading').select('takenOn').where('id', 'in', readingIds).orderBy('takenOn').limit(1).executeTakeFirst()
  const made = await openMark(trx, actor, { id: from.unitId, organisationId: from.organisationId }, room, {
    kind: from.kind, pin, place: null, shape: null, direction: 'not-known', stain: from.stainState ?? 'none', firstSeenOn: first?.takenOn ?? dayIn(actor.timeZone),
  })
  return trx.updateTable('mark').set({ label, atticId: from.atticId }).where('id', '=', made.id).returningAll().executeTakeFirstOrThrow()
}

/** Photos go with the reading or the report that they came with. */
async function moveChosen(trx: Trx, fromId: string, toId: string, { readingIds, observationIds }: MarkSplitValue) {
  const set = { markId: toId }
  if (readingIds.length > 0) {
    await trx.updateTable('reading').set(set).where('id', 'in', readingIds).execute()
    await trx.updateTable('photo').set(set).where('readingId', 'in', readingIds).where('markId', '=', fromId).execute()
  }
  if (observationIds.length > 0) {
    await trx.updateTable('observation').set(set).where('id', 'in', observationIds).execute()
    await trx.updateTable('photo').set(set).where('observationId', 'in', observationIds).where('markId', '=', fromId).execute()
  }
}

/** A repair was of both as far as anybody knows; a break too many never makes a false trend, a missing one may. */
async function keepRepairs(trx: Trx, fromId: string, toId: string) {
  const repairs = await trx.selectFrom('markRepair').selectAll().where('markId', '=', fromId).execute()
  if (repairs.length > 0) await trx.insertInto('markRepair').values(repairs.map(repair => ({ ...repair, id: newId(), markId: toId }))).execute()
}
