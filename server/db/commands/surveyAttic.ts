import type { Db } from '../connect'
import type { AtticSurvey } from '../../../shared/types/attic'
import { rateAttic } from '../../../shared/utils/structure/rating'
import { asAtticDocument, findDocuments } from '../queries/attics'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord, type RecordActor } from './appendRecord'
import { judgeAttic } from './judgeAttic'

interface AtticRef { id: string, organisationId: string, unitId: string, name: string }

/** Keeps a survey with the rating it gave on the day; earlier surveys stay. Everything above the ceiling is judged anew. */
export function surveyAttic(db: Db, actor: RecordActor & { userId: string }, attic: AtticRef, survey: AtticSurvey) {
  return db.transaction().execute(async (trx) => {
    const documents = (await findDocuments(trx, attic.id)).map(asAtticDocument)
    const rating = rateAttic(survey, documents)
    const row = await trx.insertInto('atticSurvey').values({
      id: newId(), organisationId: attic.organisationId, unitId: attic.unitId, atticId: attic.id,
      surveyedOn: survey.surveyedOn, answers: JSON.stringify(survey), ratedPsf: rating.ratedPsf, onHold: rating.hold, basis: rating.basis,
      surveyedBy: actor.userId, createdAt: nowInstant(),
    }).returningAll().executeTakeFirstOrThrow()
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', subjectId: attic.id, action: 'attic surveyed',
      after: { surveyId: row.id, surveyedOn: survey.surveyedOn, framing: survey.framing, ratedPsf: rating.ratedPsf, onHold: rating.hold, basis: rating.basis, answers: survey },
    })
    await judgeAttic(trx, actor, attic.id)
    return { surveyId: row.id, rating }
  })
}
