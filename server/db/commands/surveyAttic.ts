import type { Db } from '../connect'
import type { AtticSurvey } from '../../../shared/types/attic'
import { formatDay } from '../../../shared/utils/days'
import { damageOnRecord, rateAttic } from '../../../shared/utils/structure/rating'
import { asAtticDocument, findDocuments, findLatestSurvey } from '../queries/attics'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { unsound } from '../../utils/problems'
import { appendRecord, type RecordActor } from './appendRecord'
import { judgeAttic } from './judgeAttic'
import { lockAttic, type AtticRef } from './lockAttic'
import { refuseFuture } from './refuseFuture'

/**
 * Keeps a survey with the rating it gave on the day; earlier surveys stay. Everything above the ceiling is judged anew.
 * A hold outlives a survey that sees no damage: only a paper lifts it.
 */
export function surveyAttic(db: Db, actor: RecordActor & { userId: string, timeZone: string }, attic: AtticRef, entered: AtticSurvey) {
  refuseFuture('surveyedOn', entered.surveyedOn, actor)
  return db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    const latest = await findLatestSurvey(trx, attic.id)
    if (latest && entered.surveyedOn < latest.surveyedOn) throw unsound({ surveyedOn: `The attic was surveyed on ${formatDay(latest.surveyedOn)}. An older survey cannot take its place.` })
    const documents = (await findDocuments(trx, attic.id)).map(asAtticDocument)
    const survey = { ...entered, earlierHold: latest ? damageOnRecord(latest.answers) : null }
    const { codeBasis } = await trx.selectFrom('unit as u').innerJoin('property as p', 'p.id', 'u.propertyId').select('p.codeBasis').where('u.id', '=', attic.unitId).executeTakeFirstOrThrow()
    const rating = rateAttic({ ...survey, codeBasis }, documents)
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
