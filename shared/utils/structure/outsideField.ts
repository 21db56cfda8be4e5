import type { AtticSurvey } from '../../types/attic'
import { formatLength } from '../units'
import { fieldWidthFt } from './checkLoadPlan'

export interface FieldSpot { fieldNumber: number, xFt: number, yFt: number, lengthFt: number, widthFt: number }

/** Room for rounding in entered feet, as the load plan has it. */
const ROUNDING_FT = 1e-6

/** Where the joists are measured, an item must stand inside their field: what is wrong, by field of the form. */
export function outsideField(survey: AtticSurvey | null, spot: FieldSpot): Record<string, string> {
  const surveyed = survey?.joistFields ?? []
  const field = surveyed[spot.fieldNumber - 1]
  if (surveyed.length > 0 && !field) return { fieldNumber: 'There is no such group of joists in the survey.' }
  if (!field || field.spanFt === null || field.spacingIn === null || field.joistCount === null) return {}
  const widthFt = fieldWidthFt({ spacingIn: field.spacingIn, joistCount: field.joistCount })
  return {
    ...spot.xFt + spot.lengthFt > field.spanFt + ROUNDING_FT ? { xFt: `It would stick out: the span is ${formatLength(field.spanFt)}.` } : {},
    ...spot.yFt + spot.widthFt > widthFt + ROUNDING_FT ? { yFt: `It would stick out: the joists reach ${formatLength(widthFt)}.` } : {},
  }
}
