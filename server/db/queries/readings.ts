import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db, Trx } from '../connect'
import type { ReadingAnswer, ReadingRow } from '../../../shared/types/markPage'
import { suddenRises } from '../../../shared/utils/movement/sudden'
import { seriesOf } from '../../../shared/utils/movement/series'
import { trendOptionsFor } from '../../../shared/utils/movement/trendOptions'
import type { ReadingDetail } from '../../../shared/types/readingDetail'
import type { MarkKind, ReadingMethod } from '../../../shared/types/mark'
import { limitColumns } from './limits'

/** How the database names what a reading of each kind measures. */
export const QUANTITY_COLUMNS = { 'crack': 'width_mm', 'nail-pops': 'pop_count', 'sag': 'drop_mm', 'stain': 'size_mm' } as const

export const findReadingByKey = (trx: Trx, takenBy: string, clientKey: string) =>
  trx.selectFrom('reading').select(['id', 'markId']).where('takenBy', '=', takenBy).where('clientKey', '=', clientKey).executeTakeFirst()

/** Sizes of one segment up to a day, oldest first. */
export async function listSegmentValues(db: Db | Trx, markId: string, segment: number, untilOn: string): Promise<number[]> {
  const rows = await db.selectFrom('reading').select('value').where('markId', '=', markId).where('segment', '=', segment)
    .where('value', 'is not', null).where('takenOn', '<=', untilOn).orderBy('takenOn').orderBy('receivedAt').execute()
  return rows.map(row => row.value!)
}

/** Ours: older pairs tell of an older hand. */
const PAIRS_LOOKED_AT = 30

/** A person's double readings by one method, newest first. */
export async function listDoubleReadings(db: Db | Trx, takenBy: string, method: ReadingMethod, kind: MarkKind): Promise<[number, number][]> {
  const rows = await db.selectFrom('reading').select(['firstValue', 'secondValue']).where('takenBy', '=', takenBy).where('method', '=', method)
    .where('quantity', '=', QUANTITY_COLUMNS[kind]).where('secondValue', 'is not', null).orderBy('receivedAt', 'desc').limit(PAIRS_LOOKED_AT).execute()
  return rows.map(row => [row.firstValue!, row.secondValue!])
}

/** The last length on record on or before a day; null when nobody measured one. */
export async function findLengthBefore(db: Db | Trx, markId: string, on: string): Promise<number | null> {
  const row = await db.selectFrom('reading').select('lengthMm').where('markId', '=', markId).where('lengthMm', 'is not', null).where('takenOn', '<=', on)
    .orderBy('takenOn', 'desc').orderBy('receivedAt', 'desc').limit(1).executeTakeFirst()
  return row?.lengthMm ?? null
}

const readingsOf = compiledOnce((db, { markId }: { markId: string }) =>
  db.selectFrom('reading as r').innerJoin('appUser as u', 'u.id', 'r.takenBy')
    .select(['r.id', 'r.takenOn', 'r.receivedAt', 'u.name as takenBy', 'r.segment', 'r.method', 'r.value', 'r.sigma', 'r.low', 'r.high', 'r.firstValue', 'r.secondValue', 'r.lengthMm', 'r.stainState', 'r.couldNotMeasureReason', 'r.note', 'r.detail'])
    .select(eb => eb.selectFrom('markJoiningPart as p').innerJoin('markJoining as j', 'j.id', 'p.joiningId').innerJoin('mark as o', 'o.id', 'j.markId')
      .select('o.number').whereRef('p.partId', '=', 'r.id').where('p.kind', '=', 'reading').where('j.undoneAt', 'is', null).orderBy('j.joinedAt').limit(1).as('fromMark'))
    .where('r.markId', '=', markId).orderBy('r.takenOn').orderBy('r.receivedAt').limit(2000))

/** Every reading of a mark, oldest first; what was tucked into `detail` is laid open. */
export async function listReadings(db: Db, markId: string): Promise<ReadingRow[]> {
  const rows = await readingsOf.rows(db, { markId })
  return rows.map(({ detail, ...row }) => {
    const { spanMm = null, tip = null, tipPastMm = null, reportId = null, photo = null, stationsMm = null, sinceSet = null, wroteFirst = null, askedAgainstUsual = null, phoneAt = null, cameraOn = null } = detail as ReadingDetail
    return { ...row, spanMm, tip, tipPastMm, reportId, photo, stationsMm, sinceSet, wroteFirst, askedAgainstUsual, phoneAt, cameraOn }
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
