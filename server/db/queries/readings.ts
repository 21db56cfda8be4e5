import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db, Trx } from '../connect'
import type { ReadingAnswer, ReadingRow } from '../../../shared/types/markPage'
import { suddenRises } from '../../../shared/utils/movement/sudden'
import { seriesOf } from '../../../shared/utils/movement/series'
import { trendOptionsFor } from '../../../shared/utils/movement/trendOptions'
import type { ReadingDetail } from '../commands/insertReading'
import { limitColumns } from './limits'

export const findReadingByKey = (trx: Trx, takenBy: string, clientKey: string) =>
  trx.selectFrom('reading').select(['id', 'markId']).where('takenBy', '=', takenBy).where('clientKey', '=', clientKey).executeTakeFirst()

/** Sizes of one segment up to a day, oldest first. */
export async function listSegmentValues(db: Db | Trx, markId: string, segment: number, untilOn: string): Promise<number[]> {
  const rows = await db.selectFrom('reading').select('value').where('markId', '=', markId).where('segment', '=', segment)
    .where('value', 'is not', null).where('takenOn', '<=', untilOn).orderBy('takenOn').orderBy('receivedAt').execute()
  return rows.map(row => row.value!)
}

const readingsOf = compiledOnce((db, { markId }: { markId: string }) =>
  db.selectFrom('reading as r').innerJoin('appUser as u', 'u.id', 'r.takenBy')
    .select(['r.id', 'r.takenOn', 'r.receivedAt', 'u.name as takenBy', 'r.segment', 'r.method', 'r.value', 'r.sigma', 'r.low', 'r.high', 'r.lengthMm', 'r.stainState', 'r.couldNotMeasureReason', 'r.note', 'r.detail'])
    .where('r.markId', '=', markId).orderBy('r.takenOn').orderBy('r.receivedAt').limit(2000))

/** Every reading of a mark, oldest first; what was tucked into `detail` is laid open. */
export async function listReadings(db: Db, markId: string): Promise<ReadingRow[]> {
  const rows = await readingsOf.rows(db, { markId })
  return rows.map(({ detail, ...row }) => {
    const { spanMm = null, tip = null, reportId = null } = detail as ReadingDetail
    return { ...row, spanMm, tip, reportId }
  })
}

/** What the person who took this reading is told; null-valued where it could not be measured. */
export async function findReadingAnswer(db: Db, id: string): Promise<ReadingAnswer | undefined> {
  const row = await db.selectFrom('reading as r').innerJoin('mark as m', 'm.id', 'r.markId').innerJoin('organisation as o', 'o.id', 'r.organisationId')
    .select([...limitColumns, 'r.id', 'r.markId', 'r.takenOn', 'r.receivedAt', 'r.value', 'r.segment', 'r.detail', 'm.activity', 'm.nextReadingOn', 'm.kind'])
    .where('r.id', '=', id).executeTakeFirst()
  if (!row) return undefined
  const { id: readingId, markId, takenOn, receivedAt, value, segment, detail, kind, activity, nextReadingOn } = row
  const answer = { id: readingId, markId, takenOn, receivedAt, value, activity, nextReadingOn }
  const points = await db.selectFrom('reading').select(['takenOn', sql<number>`value`.as('value'), sql<number>`sigma`.as('sigma')])
    .where('markId', '=', row.markId).where('segment', '=', segment).where('value', 'is not', null).execute()
  const { leastJump, jumpSigmas } = trendOptionsFor({ kind, place: null, wallType: null, framing: null }, row)
  const rise = suddenRises(seriesOf(points), leastJump, jumpSigmas).find(jump => jump.takenOn === row.takenOn)
  const { reportId } = detail as ReadingDetail
  const report = reportId
    ? await db.selectFrom('observation').select(['id', 'number', 'dangerSigns']).where('id', '=', reportId).$castTo<NonNullable<ReadingAnswer['report']>>().executeTakeFirst()
    : undefined
  return {
    ...answer, report: report ?? null,
    sudden: rise ? { value: rise.value, baseline: rise.baseline } : null,
  }
}
