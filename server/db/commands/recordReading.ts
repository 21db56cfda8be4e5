import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { ReadingAnswer } from '../../../shared/types/markPage'
import type { ReadingValue } from '../../../shared/schemas/reading'
import { askAgainSentence, otherDaySentence, pairSentence, refusedReadingSentence } from '../../../shared/utils/messages/readingMessages'
import { valueToAskAgain } from '../../../shared/utils/movement/askAgain'
import { pairDiffersTooMuch, readingSize, type ReadingSize } from '../../../shared/utils/movement/readingSize'
import { readingSigma } from '../../../shared/utils/movement/readingSigma'
import { segmentOf } from '../../../shared/utils/movement/segmentOf'
import { daysBetween } from '../../../shared/utils/days'
import type { ReadingDetail } from '../../../shared/types/readingDetail'
import { NOTHING_ASKED, type DangerSign, type MarkKind, type ObservationAnswers } from '../../../shared/types/mark'
import { dayIn, now, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { notFound, problem, unsound } from '../../utils/problems'
import { findLengthBefore, findReadingAnswer, findReadingByKey, listDoubleReadings, listSegmentValues } from '../queries/readings'
import { listRepairs } from '../queries/repairs'
import { attachPhotos } from './attachPhotos'
import { insertObservation } from './insertObservation'
import { insertReading } from './insertReading'
import { judgeMark } from './judgeMark'
import { lockUnit } from './lockUnit'
import { reopenMark, type FollowedMark } from './openMark'
import { tellOfRepeatedReport } from './tellOfRepeatedReport'

/** A later reading of a mark, judged at once. The same key from the same person gives the first answer again. */
export async function recordReading(db: Db, actor: Actor, mark: FollowedMark, clientKey: string | undefined, body: ReadingValue): Promise<ReadingAnswer> {
  if (!clientKey) throw problem(422, 'idempotency-key-needed', 'This reading came without its own key, so that sending it twice could not be told apart. Please open the form again.')
  const id = await db.transaction().execute(async (trx) => {
    await lockUnit(trx, mark.organisationId, mark.unitId)
    const earlier = await findReadingByKey(trx, actor.userId, clientKey)
    if (earlier && earlier.markId !== mark.id) throw problem(409, 'key-used', 'This key belongs to a reading of another mark.')
    return earlier?.id ?? await writeReading(trx, actor, mark.id, clientKey, body)
  })
  const answer = await findReadingAnswer(db, id)
  if (!answer) throw notFound()
  return answer
}

async function writeReading(trx: Trx, actor: Actor, markId: string, clientKey: string, body: ReadingValue): Promise<string> {
  const found = await trx.selectFrom('mark').selectAll().where('id', '=', markId).forUpdate().executeTakeFirst()
  if (!found) throw notFound()
  if (found.joinedInto) throw problem(409, 'mark-joined', 'This mark counts as part of another one. Take the reading there.')
  if (found.state === 'closed') throw problem(409, 'mark-closed', 'This mark is closed. Open it again before recording a reading.')
  const today = dayIn(actor.timeZone)
  if (body.takenOn > today) throw unsound({ takenOn: 'That day is still to come.' })
  const segment = segmentOf({ takenOn: body.takenOn, receivedAt: nowInstant() }, await listRepairs(trx, markId))
  const measured = await sizeOf(trx, actor, found.kind, body)
  const usual = measured.kind === 'measured' ? await askAgain(trx, { ...found, segment }, body, measured) : null
  const seenAgain = found.state === 'repaired' && segment === found.segment && measured.kind === 'measured' && measured.value > 0
  const mark = seenAgain ? await reopenMark(trx, actor, found, body.takenOn, 'measured again') : found
  const photos = await attachPhotos(trx, actor, mark.unitId, body.photoIds, { markId })
  const cameraOn = otherCameraDay(photos, body)
  const report = await reportDanger(trx, actor, mark, body)
  const reading = await insertReading(trx, actor, { ...mark, segment }, {
    clientKey, takenOn: body.takenOn, measured, lengthMm: await lengthOf(trx, mark.id, body), stain: body.stain, note: body.note, photos: photos.map(({ id, sha256 }) => ({ id, sha256 })),
    detail: detailOf(body, { reportId: report?.id, stationsMm: measured.kind === 'measured' ? measured.stationsMm : null, askedAgainstUsual: usual, cameraOn, phoneAt: clockApart(body.phoneAt) }),
  })
  if (photos.length > 0) await trx.updateTable('photo').set({ readingId: reading.id }).where('id', 'in', body.photoIds).execute()
  if (body.stain !== null) await trx.updateTable('mark').set({ stainState: body.stain === 'none' ? null : body.stain }).where('id', '=', markId).execute()
  await judgeMark(trx, actor, markId)
  if (report) await tellOfRepeatedReport(trx, actor, mark, report.id)
  return reading.id
}

/** Only what was said: a reading by ruler carries nothing about pins or photos. */
function detailOf({ spanMm, tip, tipPastMm, photo, sinceSet, checkRulerMm, wroteFirst }: ReadingValue, found: ReadingDetail): ReadingDetail {
  const said = { tipPastMm, photo, sinceSet, checkRulerMm, wroteFirst, ...found }
  return { spanMm, tip, ...Object.fromEntries(Object.entries(said).filter(([, value]) => value !== null && value !== undefined)) }
}

/** Dated pencil marks at the tips: the length grows by what is past them. */
async function lengthOf(trx: Trx, markId: string, body: ReadingValue): Promise<number | null> {
  if (body.lengthMm !== null || body.tipPastMm === null) return body.lengthMm
  const before = await findLengthBefore(trx, markId, body.takenOn)
  return before === null ? null : before + body.tipPastMm
}

/** Danger seen while reading is a report like any other: it has a number, starts its clock, and stands until somebody has looked. */
async function reportDanger(trx: Trx, actor: Actor, mark: FollowedMark, body: ReadingValue): Promise<{ id: string } | undefined> {
  const dangerSigns = dangerSignsOf(body)
  if (dangerSigns.length === 0) return undefined
  const answers: ObservationAnswers = {
    ...NOTHING_ASKED, kind: mark.kind, roomId: mark.roomId, pin: { xShare: mark.pinX, yShare: mark.pinY },
    stain: body.stain ?? 'none', dangerSigns, firstSeenOn: body.takenOn, note: body.note || null,
  }
  return insertObservation(trx, actor, mark, { answers, clientKey: newId(), photoIds: [] })
}

async function sizeOf(trx: Trx, actor: Actor, kind: MarkKind, body: ReadingValue): Promise<Extract<ReadingSize, { kind: 'measured' }> | { kind: 'could-not-measure', reason: string }> {
  const { method, reason, photo, photoIds } = body
  if (method === 'could-not-measure') return { kind: 'could-not-measure', reason: reason ?? '' }
  if (photo && !photoIds.includes(photo.photoId)) throw unsound({ photo: 'The photo that was measured in is not with this reading. Please add it again.' })
  const measured = readingSize(kind, { ...body, method }, await listDoubleReadings(trx, actor.userId, method, kind))
  if (measured.kind === 'refused') throw unsound({ [measured.field]: refusedReadingSentence(kind, measured.why) })
  return measured
}

/** Asked once; `confirmed` answers it. Yields the usual size that made us ask, for the record. */
async function askAgain(trx: Trx, mark: FollowedMark, { takenOn, confirmed }: ReadingValue, { value, method, first, second }: Extract<ReadingSize, { kind: 'measured' }>): Promise<number | null> {
  const usual = valueToAskAgain(mark.kind, value, await listSegmentValues(trx, mark.id, mark.segment, takenOn))
  if (confirmed) return usual
  if (usual !== null) {
    const sentence = askAgainSentence(mark.kind, value, usual)
    throw problem(422, 'ask-again', sentence, { fields: { value: sentence }, usual })
  }
  if (first !== null && second !== null && pairDiffersTooMuch(first, second, readingSigma(mark.kind, method))) {
    const sentence = pairSentence(mark.kind, first, second)
    throw problem(422, 'ask-again', sentence, { fields: { second: sentence } })
  }
  return null
}

/** Ours: a day's difference is a matter of time zones and midnight. */
const DAYS_APART = 1

/** A camera clock that tells another day is asked about once; then both days are kept. */
function otherCameraDay(photos: readonly { cameraTime: string | null }[], { takenOn, dayConfirmed }: ReadingValue): string | null {
  const cameraOn = photos.flatMap(({ cameraTime }) => cameraTime ? [cameraTime.slice(0, 10)] : []).find(on => Math.abs(daysBetween(on, takenOn)) > DAYS_APART) ?? null
  if (cameraOn === null || dayConfirmed) return cameraOn
  const sentence = otherDaySentence(cameraOn, takenOn)
  throw problem(422, 'ask-day', sentence, { fields: { takenOn: sentence }, cameraOn })
}

const CLOCK_OFF_MS = 10 * 60_000

/** The server's clock counts; a phone's that is off by more than ten minutes is kept beside it. */
const clockApart = (phoneAt: string | null): string | null =>
  phoneAt !== null && Math.abs(Date.parse(phoneAt) - now().getTime()) > CLOCK_OFF_MS ? phoneAt : null

/** Water that drips is a danger whether or not its box was ticked. */
const dangerSignsOf = (body: ReadingValue): DangerSign[] =>
  [...new Set<DangerSign>([...body.dangerSigns, ...(body.stain === 'dripping' ? ['water-dripping' as const] : [])])]
