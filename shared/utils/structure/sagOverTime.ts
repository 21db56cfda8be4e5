import type { AtticSurvey } from '../../types/attic'
import type { LoadField, LoadPlanProblem, PlacedItem } from '../../types/loadPlan'
import { checkLoadPlan } from './checkLoadPlan'
import { joistLoads } from './itemShares'
import { deflectionDivisor } from './joistCapacity'
import { KCR_DRY, KCR_GREEN_OR_DAMP } from './ndsFactors'
import { maxDeflection, traceSpan } from './spanTrace'

/** A sag that anybody sees, as a share of the span (practice). */
export const VISIBLE_DIVISOR = 120

/**
 * What decides how far stored goods may bend a ceiling: its finish (IRC R301.7) and whether the wood is damp. Where nobody
 * has looked at the wood it is taken as damp, on the safe side.
 */
export function sagTerms(survey: Pick<AtticSurvey, 'ceilingFinish' | 'conditions'>): { deflectionDivisor: number, greenOrDamp: boolean } {
  const greenOrDamp = survey.conditions === null || survey.conditions.some(condition => condition === 'wet' || condition === 'mouldy' || condition === 'rotten')
  return { deflectionDivisor: deflectionDivisor(survey.ceilingFinish).divisor, greenOrDamp }
}

export interface JoistSag {
  immediateIn: number
  /** Kcr times the immediate sag: stored goods stay. */
  longTermIn: number
  /** Long-term sag over the limit of the ceiling's finish, L/240 or L/360. */
  finishRatio: number
  /** Long-term sag over L/120. */
  visibleRatio: number
}

export type SagOverTime
  = | { kind: 'sag', kcr: number, finishLimitIn: number, visibleLimitIn: number, joists: JoistSag[] }
    | { kind: 'refused', problems: LoadPlanProblem[] }

/** Sag of each joist under its stored load, at once and over the years (NDS 2018 3.5.2), without sharing by strongbacks. */
export function sagOverTime(field: LoadField, items: PlacedItem[], ceiling: { deflectionDivisor: number, greenOrDamp: boolean }): SagOverTime {
  const problems = checkLoadPlan(field, items)
  if (problems.length > 0) return { kind: 'refused', problems }
  const kcr = ceiling.greenOrDamp ? KCR_GREEN_OR_DAMP : KCR_DRY
  const finishLimitIn = field.spanFt * 12 / ceiling.deflectionDivisor
  const visibleLimitIn = field.spanFt * 12 / VISIBLE_DIVISOR
  const joists = joistLoads(field, items).map((loads): JoistSag => {
    const immediateIn = maxDeflection(traceSpan(field.spanFt, loads)).size * 1728 / field.joistEiLbIn2
    const longTermIn = kcr * immediateIn
    return { immediateIn, longTermIn, finishRatio: longTermIn / finishLimitIn, visibleRatio: longTermIn / visibleLimitIn }
  })
  return { kind: 'sag', kcr, finishLimitIn, visibleLimitIn, joists }
}
