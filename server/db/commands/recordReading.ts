import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { ReadingAnswer } from '../../../shared/types/markPage'
import type { ReadingValue } from '../../../shared/schemas/reading'
import { askAgainSentence, refusedReadingSentence } from '../../../shared/utils/messages/readingMessages'
import { valueToAskAgain } from '../../../shared/utils/movement/askAgain'
import { measureReading, type MeasuredReading } from '../../../shared/utils/movement/measureReading'
import { NOTHING_ASKED, type DangerSign, type MarkKind, type ObservationAnswers } from '../../../shared/types/mark'
import { dayIn } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { notFound, problem, unsound } from '../../utils/problems'
import { findReadingAnswer, findReadingByKey, listSegmentValues } from '../queries/readings'
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
  if (found.state === 'closed') throw problem(409, 'mark-closed', 'This mark is closed. Open it again before recording a reading.')
  const today = dayIn(actor.timeZone)
  if (body.takenOn > today) throw unsound({ takenOn: 'That day is still to come.' })
  const measured = sizeOf(found.kind, body)
  if (measured.kind === 'measured' && !body.confirmed) await askAgain(trx, found, body.takenOn, measured.value)
  const seenAgain = found.state === 'repaired' && measured.kind === 'measured' && measured.value > 0
  const mark = seenAgain ? await reopenMark(trx, actor, found, body.takenOn, 'measured again') : found
  const photos = await attachPhotos(trx, actor, mark.unitId, body.photoIds, { markId })
  const report = await reportDanger(trx, actor, mark, body)
  const reading = await insertReading(trx, actor, mark, {
    clientKey, takenOn: body.takenOn, measured, lengthMm: body.lengthMm, stain: body.stain, note: body.note, photos: photos.map(({ id, sha256 }) => ({ id, sha256 })),
    detail: { spanMm: body.spanMm, tip: body.tip, reportId: report?.id },
  })
  if (photos.length > 0) await trx.updateTable('photo').set({ readingId: reading.id }).where('id', 'in', body.photoIds).execute()
  if (body.stain !== null) await trx.updateTable('mark').set({ stainState: body.stain === 'none' ? null : body.stain }).where('id', '=', markId).execute()
  await judgeMark(trx, actor, markId)
  if (report) await tellOfRepeatedReport(trx, actor, mark, report.id)
  return reading.id
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

function sizeOf(kind: MarkKind, body: ReadingValue): Extract<MeasuredReading, { kind: 'measured' }> | { kind: 'could-not-measure', reason: string } {
  if (body.method === 'could-not-measure') return { kind: 'could-not-measure', reason: body.reason ?? '' }
  const measured = measureReading(kind, { method: body.method, value: body.value, atLeast: body.atLeast, atMost: body.atMost })
  if (measured.kind === 'refused') throw unsound({ [measured.field]: refusedReadingSentence(kind, measured.why) })
  return measured
}

/** Asked once; `confirmed` answers it. */
async function askAgain(trx: Trx, mark: FollowedMark, takenOn: string, value: number) {
  const usual = valueToAskAgain(mark.kind, value, await listSegmentValues(trx, mark.id, mark.segment, takenOn))
  if (usual === null) return
  const sentence = askAgainSentence(mark.kind, value, usual)
  throw problem(422, 'ask-again', sentence, { fields: { value: sentence }, usual })
}

/** Water that drips is a danger whether or not its box was ticked. */
const dangerSignsOf = (body: ReadingValue): DangerSign[] =>
  [...new Set<DangerSign>([...body.dangerSigns, ...(body.stain === 'dripping' ? ['water-dripping' as const] : [])])]
