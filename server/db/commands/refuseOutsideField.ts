import { outsideField, type FieldSpot } from '../../../shared/utils/structure/outsideField'
import { unsound } from '../../utils/problems'
import type { Trx } from '../connect'
import { findLatestSurvey } from '../queries/attics'

/** Where the joists are measured, an item must stand inside their field. `at` names which of several: 'moves.2.'. */
export async function refuseOutsideField(trx: Trx, atticId: string, spot: FieldSpot, at = '') {
  const survey = await findLatestSurvey(trx, atticId)
  const fields = Object.entries(outsideField(survey?.answers ?? null, spot)).map(([name, message]) => [`${at}${name}`, message] as const)
  if (fields.length > 0) throw unsound(Object.fromEntries(fields))
}
