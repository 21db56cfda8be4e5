import { sql, type RawBuilder } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { AtticSurvey } from '../../../shared/types/attic'
import type { KeptSurvey } from '../../../shared/types/atticDetail'
import type { RatingBasis } from '../../../shared/types/atticRating'

/** The answers of the survey `s` together with the table of loads its property goes by now. */
export const judgedAnswers = (): RawBuilder<AtticSurvey> => sql<AtticSurvey>`s.answers || jsonb_build_object('codeBasis',
  (select p.code_basis from unit u join property p on p.id = u.property_id where u.id = s.unit_id))`

const keptSurveys = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('atticSurvey as s').innerJoin('appUser as u', 'u.id', 's.surveyedBy')
    .select(['s.id', 's.surveyedOn', 's.ratedPsf', 's.onHold', 's.basis', 's.answers', 's.createdAt', 'u.name as surveyedByName'])
    .where('s.atticId', '=', atticId).orderBy('s.createdAt', 'desc').orderBy('s.id', 'desc').limit(50))

/** Every survey as it was answered and rated on its day, newest first. */
export async function findKeptSurveys(db: Db, atticId: string): Promise<{ rows: KeptSurvey[] }> {
  const rows = await keptSurveys.rows(db, { atticId })
  return { rows: rows.map(({ basis, ...row }) => ({ ...row, basis: basis as RatingBasis })) }
}
