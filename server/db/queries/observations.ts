import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db, Trx } from '../connect'
import type { DangerSign, ObservationAnswers, ReadingMethod } from '../../../shared/types/mark'
import type { ReportRow } from '../../../shared/types/markPage'
import type { Receipt } from '../../../shared/types/receipt'
import { reportClass } from '../../../shared/utils/movement/reportClass'
import { correctBy } from '../../../shared/utils/upkeep/responseTimes'
import { photoRefColumns } from './photos'

export const findObservationByKey = (trx: Trx, reportedBy: string, clientKey: string) =>
  trx.selectFrom('observation').select(['id', 'unitId']).where('reportedBy', '=', reportedBy).where('clientKey', '=', clientKey).executeTakeFirst()

const findReportFacts = (db: Db | Trx, id: string) => db.selectFrom('observation as o')
  .innerJoin('mark as m', 'm.id', 'o.markId').innerJoin('room as r', 'r.id', 'o.roomId').innerJoin('unit as u', 'u.id', 'o.unitId')
  .innerJoin('property as p', 'p.id', 'u.propertyId').innerJoin('organisation as g', 'g.id', 'o.organisationId').innerJoin('appUser as a', 'a.id', 'o.reportedBy')
  .select(['o.id', 'o.organisationId', 'o.number', 'o.receivedAt', 'o.answers', 'o.dangerSigns', 'o.startedAt', 'o.correctedAt', 'o.paperReporter', 'o.paperFilledInOn', 'o.unitId', 'o.roomId', 'o.markId',
    'a.name as reportedBy', 'u.name as unitName', 'p.name as propertyName', 'r.name as roomName',
    'm.number as markNumber', 'm.label', 'm.kind', 'm.state', 'm.firstSeenOn', 'm.nextReadingOn',
    'g.timeZone', 'g.contactPhone', 'g.dangerResponseHours', 'g.urgentResponseHours', 'g.routineResponseDays', 'g.entryNoticeHours'])
  .select(eb => eb.exists(eb.selectFrom('observation as e').select('e.id').whereRef('e.markId', '=', 'o.markId').whereRef('e.number', '<', 'o.number')).as('joinedKnownMark'))
  .where('o.id', '=', id).executeTakeFirst()

/** What the person who reported holds in hand; undefined when there is no such report. */
export async function findReceipt(db: Db | Trx, id: string): Promise<Receipt | undefined> {
  const found = await findReportFacts(db, id)
  if (!found) return undefined
  const answers = found.answers as ObservationAnswers
  const responseClass = reportClass(answers)
  const policy = {
    hours: { danger: found.dangerResponseHours, urgent: found.urgentResponseHours, routine: found.routineResponseDays * 24 },
    entryNoticeHours: found.entryNoticeHours,
  }
  const [reading, photos] = await Promise.all([findReportReading(db, found.markId, id), listReportPhotos(db, id)])
  return {
    id: found.id, number: found.number, receivedAt: found.receivedAt, reportedBy: found.reportedBy,
    paper: found.paperReporter && found.paperFilledInOn ? { reporterName: found.paperReporter, filledInOn: found.paperFilledInOn } : null, timeZone: found.timeZone,
    unit: { id: found.unitId, name: found.unitName, propertyName: found.propertyName }, room: { id: found.roomId, name: found.roomName },
    mark: { id: found.markId, number: found.markNumber, label: found.label, kind: found.kind, state: found.state, firstSeenOn: found.firstSeenOn, nextReadingOn: found.nextReadingOn },
    joinedKnownMark: Boolean(found.joinedKnownMark), answers, dangerSigns: found.dangerSigns as DangerSign[],
    responseClass, correctBy: correctBy(responseClass, found.receivedAt, policy), startedAt: found.startedAt, correctedAt: found.correctedAt,
    reading: reading ?? null, photos, contactPhone: found.contactPhone,
  }
}

async function findReportReading(db: Db | Trx, markId: string, observationId: string): Promise<Receipt['reading'] | undefined> {
  const row = await db.selectFrom('reading').select(['value', 'low', 'high', 'method']).where('markId', '=', markId)
    .where(sql<boolean>`detail->>'observationId' = ${observationId}`).executeTakeFirst()
  return row && row.value !== null ? { value: row.value, low: row.low, high: row.high, method: row.method as ReadingMethod } : undefined
}

const listReportPhotos = (db: Db | Trx, observationId: string) =>
  db.selectFrom('photo').select(photoRefColumns).where('observationId', '=', observationId).orderBy('uploadedAt').execute()

const reportsOfMark = compiledOnce((db, { markId }: { markId: string }) =>
  db.selectFrom('observation as o').innerJoin('appUser as a', 'a.id', 'o.reportedBy')
    .select(['o.id', 'o.number', 'o.receivedAt', 'a.name as reportedBy', 'o.answers', 'o.dangerSigns', 'o.startedAt', 'o.correctedAt', 'o.paperReporter', 'o.paperFilledInOn'])
    .where('o.markId', '=', markId).orderBy('o.receivedAt', 'desc').limit(100))

/** What people said of a mark, newest first. */
export async function listReportsOfMark(db: Db, markId: string): Promise<ReportRow[]> {
  const rows = await reportsOfMark.rows(db, { markId })
  return rows.map(row => ({ ...row, answers: row.answers as ObservationAnswers, dangerSigns: row.dangerSigns as DangerSign[] }))
}
