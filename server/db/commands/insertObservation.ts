import type { Trx } from '../connect'
import type { ObservationAnswers } from '../../../shared/types/mark'
import type { PaperOrigin } from '../../../shared/types/paperReport'
import { dangerSignsIn } from '../../../shared/utils/movement/impliedDanger'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord, type RecordActor } from './appendRecord'
import { attachPhotos } from './attachPhotos'
import { takeNumber } from './takeNumber'

interface ReportedMark { id: string, organisationId: string, unitId: string, number: number }
interface NewObservation { answers: ObservationAnswers, clientKey: string, photoIds: string[], paper?: PaperOrigin | null }

/** What a person reported, with its number, photos and record entry. Receipt by the server starts every response time. */
export async function insertObservation(trx: Trx, actor: RecordActor & { userId: string }, mark: ReportedMark, { answers, clientKey, photoIds, paper = null }: NewObservation): Promise<{ id: string, number: number }> {
  const id = newId()
  const number = await takeNumber(trx, mark.organisationId)
  const dangerSigns = dangerSignsIn(answers)
  await trx.insertInto('observation').values({
    id, organisationId: mark.organisationId, unitId: mark.unitId, roomId: answers.roomId, markId: mark.id, number,
    answers: JSON.stringify(answers), dangerSigns, reportedBy: actor.userId, clientKey, receivedAt: nowInstant(),
    paperReporter: paper?.reporterName ?? null, paperFilledInOn: paper?.filledInOn ?? null,
  }).execute()
  const photos = await attachPhotos(trx, actor, mark.unitId, photoIds, { observationId: id, markId: mark.id })
  await appendRecord(trx, actor, {
    organisationId: mark.organisationId, unitId: mark.unitId, subjectKind: 'observation', subjectId: id, action: paper ? 'paper report entered' : 'observation reported',
    after: { number, ...paper && { filledInBy: paper.reporterName, filledInOn: paper.filledInOn }, markId: mark.id, markNumber: mark.number, answers, dangerSigns, photos: photos.map(photo => ({ id: photo.id, sha256: photo.sha256 })) },
  })
  return { id, number }
}
