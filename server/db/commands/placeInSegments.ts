import { segmentOf } from '../../../shared/utils/movement/segmentOf'
import type { Trx } from '../connect'
import { listRepairs } from '../queries/repairs'
import { rowSet } from '../rowSet'
import { sql } from 'kysely'

/** Puts every reading of a mark into the segment of its own day, and the mark into its newest. Call it after repairs or readings came or went. */
export async function placeInSegments(trx: Trx, markId: string): Promise<void> {
  const repairs = await listRepairs(trx, markId)
  const readings = await trx.selectFrom('reading').select(['id', 'segment', 'takenOn', 'receivedAt']).where('markId', '=', markId).execute()
  const moved = readings.map(({ id, segment, ...reading }) => ({ id, segment: segmentOf(reading, repairs), was: segment })).filter(row => row.segment !== row.was)
  if (moved.length > 0) {
    await sql`update reading r set segment = v.segment from ${rowSet(moved.map(({ id, segment }) => ({ id, segment })), { id: 'uuid', segment: 'integer' })} where r.id = v.id`.execute(trx)
  }
  await trx.updateTable('mark').set({ segment: repairs.length + 1 }).where('id', '=', markId).where('segment', '!=', repairs.length + 1).execute()
}
