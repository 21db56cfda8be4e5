import type { JoistRatios, LoadField, LoadPlanProblem, PlacedItem } from '../../types/loadPlan'
import { checkLoadPlan } from './checkLoadPlan'
import { joistLoads } from './itemShares'
import { ratedEffects } from './loadPlan'
import type { BeamLoad } from './spanTrace'
import { maxDeflection, maxMoment, traceSpan } from './spanTrace'

/** HUD Residential Structural Design Guide: a person on a ceiling joist. */
export const PERSON_LB = 250
/** Places along the span where the person is tried for the deepest sag. */
const STATIONS = 48

export type PersonOnJoist
  = | { kind: 'person', personLb: number, alone: JoistRatios, withItems: JoistRatios[], worstJoist: number }
    | { kind: 'nothing-allowed', personLb: number }
    | { kind: 'refused', problems: LoadPlanProblem[] }

/**
 * Greatest effects with a person anywhere on the joist. The moment is greatest under the person, P·x(L−x)/L at x, the same
 * curve as an even load of 2P/L: one exact sum instead of a walk.
 */
function worstWithPerson(spanFt: number, loads: BeamLoad[], personLb: number): { momentLbFt: number, deflectionLbFt3: number } {
  const envelope: BeamLoad = { kind: 'uniform', lbPerFt: 2 * personLb / spanFt, fromFt: 0, toFt: spanFt }
  let deflectionLbFt3 = 0
  for (let station = 1; station < STATIONS; station++) {
    const person: BeamLoad = { kind: 'point', lb: personLb, atFt: spanFt * station / STATIONS }
    deflectionLbFt3 = Math.max(deflectionLbFt3, maxDeflection(traceSpan(spanFt, [...loads, person])).size)
  }
  return { momentLbFt: maxMoment(traceSpan(spanFt, [...loads, envelope])).size, deflectionLbFt3 }
}

/** A what-if, never part of a verdict: a person on one joist, alone and on top of what each joist carries. */
export function personOnJoist(field: LoadField, items: PlacedItem[], personLb = PERSON_LB): PersonOnJoist {
  const problems = checkLoadPlan(field, items)
  if (problems.length > 0) return { kind: 'refused', problems }
  if (field.ratedPsf === 0) return { kind: 'nothing-allowed', personLb }
  const rated = ratedEffects(field)
  const ratios = (loads: BeamLoad[]): JoistRatios => {
    const worst = worstWithPerson(field.spanFt, loads, personLb)
    return { momentRatio: worst.momentLbFt / rated.momentLbFt, deflectionRatio: worst.deflectionLbFt3 / rated.deflectionLbFt3 }
  }
  const withItems = joistLoads(field, items).map(ratios)
  const greatest = (joist: JoistRatios | undefined): number => joist ? Math.max(joist.momentRatio, joist.deflectionRatio) : 0
  const worstJoist = withItems.reduce((worst, joist, index) => greatest(joist) > greatest(withItems[worst]) ? index : worst, 0)
  return { kind: 'person', personLb, alone: ratios([]), withItems, worstJoist }
}
