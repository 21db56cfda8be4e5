import { fieldWidthFt } from '../../../shared/utils/structure/checkLoadPlan'
import { formatLength } from '../../../shared/utils/units'
import { unsound } from '../../utils/problems'
import type { Trx } from '../connect'
import { findLatestSurvey } from '../queries/attics'

export interface FieldSpot { fieldNumber: number, xFt: number, yFt: number, lengthFt: number, widthFt: number }

/** Room for rounding in entered feet, as the load plan has it. */
const ROUNDING_FT = 1e-6

/** Where the joists are measured, an item must stand inside their field. `at` names which of several: 'moves.2.'. */
export async function refuseOutsideField(trx: Trx, atticId: string, spot: FieldSpot, at = '') {
  const survey = await findLatestSurvey(trx, atticId)
  const surveyed = survey?.answers.joistFields ?? []
  const field = surveyed[spot.fieldNumber - 1]
  if (surveyed.length > 0 && !field) throw unsound({ [`${at}fieldNumber`]: 'There is no such group of joists in the survey.' })
  if (!field || field.spanFt === null || field.spacingIn === null || field.joistCount === null) return
  const widthFt = fieldWidthFt({ spacingIn: field.spacingIn, joistCount: field.joistCount })
  const fields: Record<string, string> = {}
  if (spot.xFt + spot.lengthFt > field.spanFt + ROUNDING_FT) fields[`${at}xFt`] = `It would stick out: the span is ${formatLength(field.spanFt)}.`
  if (spot.yFt + spot.widthFt > widthFt + ROUNDING_FT) fields[`${at}yFt`] = `It would stick out: the joists reach ${formatLength(widthFt)}.`
  if (Object.keys(fields).length > 0) throw unsound(fields)
}
