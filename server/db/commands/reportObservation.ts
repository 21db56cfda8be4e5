import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { Receipt } from '../../../shared/types/receipt'
import { answersOf, type ObservationValue } from '../../../shared/schemas/observation'
import type { ObservationAnswers } from '../../../shared/types/mark'
import type { PaperOrigin } from '../../../shared/types/paperReport'
import { firstReading } from '../../../shared/utils/movement/measureReading'
import { refusedReadingSentence } from '../../../shared/utils/messages/readingMessages'
import { segmentOf } from '../../../shared/utils/movement/segmentOf'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { notFound, problem, unsound } from '../../utils/problems'
import { findObservationByKey, findReceipt } from '../queries/observations'
import { listRepairs } from '../queries/repairs'
import { insertObservation } from './insertObservation'
import { insertReading } from './insertReading'
import { judgeMark } from './judgeMark'
import { lockUnit } from './lockUnit'
import { openMark, reopenMark, type FollowedMark } from './openMark'
import { refuseArchived } from './refuseArchived'
import { tellOfRepeatedReport } from './tellOfRepeatedReport'

interface ReportedUnit { id: string, organisationId: string, archivedAt: string | null }

/**
 * A report of something on a ceiling: observation, mark (new, or one that is followed already), first reading, photos,
 * record, findings and mail, all or nothing. The same key from the same person gives the first answer again. One filled in on
 * paper counts from the day it was filled in; the clock of the response times still starts when the server receives it.
 */
export async function reportObservation(db: Db, actor: Actor, unit: ReportedUnit, clientKey: string | undefined, body: ObservationValue, paper: PaperOrigin | null = null): Promise<Receipt> {
  if (!clientKey) throw problem(422, 'idempotency-key-needed', 'This report came without its own key, so that sending it twice could not be told apart. Please open the form again.')
  const id = await db.transaction().execute(async (trx) => {
    await lockUnit(trx, unit.organisationId, unit.id)
    const earlier = await findObservationByKey(trx, actor.userId, clientKey)
    if (earlier && earlier.unitId !== unit.id) throw problem(409, 'key-used', 'This key belongs to a report about another home.')
    return earlier?.id ?? await writeReport(trx, actor, unit, clientKey, body, paper)
  })
  const receipt = await findReceipt(db, id)
  if (!receipt) throw notFound()
  return receipt
}

async function writeReport(trx: Trx, actor: Actor, unit: ReportedUnit, clientKey: string, body: ObservationValue, paper: PaperOrigin | null): Promise<string> {
  refuseArchived(unit, 'unit')
  const answers = answersOf(body)
  const measured = firstReading(answers)
  if (measured?.kind === 'refused') throw unsound({ [SIZE_FIELDS[answers.kind]]: refusedReadingSentence(answers.kind, measured.why) })
  const today = dayIn(actor.timeZone)
  if (paper && paper.filledInOn > today) throw unsound({ filledInOn: 'That day is still to come.' })
  const seenOn = paper?.filledInOn ?? today
  if (answers.firstSeenOn !== null && answers.firstSeenOn > seenOn) throw unsound({ firstSeenOn: paper ? 'That is after the day the form was filled in.' : 'That day is still to come.' })
  const room = await trx.selectFrom('room').select(['id', 'name']).where('id', '=', answers.roomId).where('unitId', '=', unit.id).where('archivedAt', 'is', null).executeTakeFirst()
  if (!room) throw unsound({ roomId: 'Choose a room of this home.' })
  const mark = body.sameAsMarkId === null
    ? await openMark(trx, actor, unit, room, { ...answers, firstSeenOn: answers.firstSeenOn ?? seenOn })
    : await joinMark(trx, actor, unit, body.sameAsMarkId, answers, seenOn)
  const { id } = await insertObservation(trx, actor, mark, { answers, clientKey, photoIds: body.photoIds, paper })
  if (measured) {
    await insertReading(trx, actor, { ...mark, segment: await segmentOn(trx, mark.id, seenOn) }, {
      clientKey: newId(), takenOn: seenOn, measured, lengthMm: answers.lengthMm, note: '', stain: answers.kind === 'stain' ? answers.stain : null, photos: [],
      detail: { observationId: id, spanMm: answers.sagSpanMm, tip: answers.tip, comparison: answers.widthComparison },
    })
  }
  await judgeMark(trx, actor, mark.id)
  if (body.sameAsMarkId !== null) await tellOfRepeatedReport(trx, actor, mark, id)
  return id
}

const SIZE_FIELDS = { 'crack': 'widthMm', 'nail-pops': 'popCount', 'sag': 'sagDropMm', 'stain': 'stainSizeMm' } as const

/** The stretch between repairs that this day belongs to. */
const segmentOn = async (trx: Trx, markId: string, takenOn: string) => segmentOf({ takenOn, receivedAt: nowInstant() }, await listRepairs(trx, markId))

/** A mark that came back after a repair is open again from this day. */
async function joinMark(trx: Trx, actor: Actor, unit: ReportedUnit, markId: string, answers: ObservationAnswers, seenOn: string): Promise<FollowedMark> {
  const named = await trx.selectFrom('mark').select('joinedInto').where('id', '=', markId).where('unitId', '=', unit.id).executeTakeFirst()
  // A tenant's page may still name a mark that has since been joined into another.
  const mark = await trx.selectFrom('mark').selectAll().where('id', '=', named?.joinedInto ?? markId).where('unitId', '=', unit.id).forUpdate().executeTakeFirst()
  if (!mark || mark.state === 'closed') throw unsound({ sameAsMarkId: 'That mark is not being followed here. Report it as a new one.' })
  if (mark.kind !== answers.kind) throw unsound({ sameAsMarkId: 'That mark is of another kind. Report this as a new one.' })
  // A sheet entered late does not undo what was seen since.
  if (answers.stain !== 'none' && (mark.lastReadOn === null || seenOn >= mark.lastReadOn)) await trx.updateTable('mark').set({ stainState: answers.stain }).where('id', '=', mark.id).execute()
  const isSinceRepair = mark.state === 'repaired' && await segmentOn(trx, mark.id, seenOn) === mark.segment
  return isSinceRepair ? reopenMark(trx, actor, mark, seenOn, 'reported again') : mark
}
