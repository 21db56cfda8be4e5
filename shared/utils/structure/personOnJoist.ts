import type { JoistRatios, LoadField, LoadPlanProblem, PlacedItem } from '../../types/loadPlan'
import { checkLoadPlan } from './checkLoadPlan'
import { joistLoads } from './itemShares'
import { ratedEffects } from './loadPlan'
import type { BeamLoad } from './spanTrace'
import { maxMoment, traceSpan } from './spanTrace'
import { spanSweeper, sweepLoads } from './spanSweep'

/** HUD Residential Structural Design Guide: a person on a ceiling joist. */
export const PERSON_LB = 250
/** Places along the span where the person is tried for the deepest sag. */
const STATIONS = 48

/** One joist with a person at the worst place for bending; `atFt` is that place. */
export interface PersonRatios extends JoistRatios { atFt: number, share: number }

export type PersonOnJoist
  = | { kind: 'person', personLb: number, alone: PersonRatios, withItems: PersonRatios[], worstJoist: number }
    | { kind: 'nothing-allowed', personLb: number }
    | { kind: 'refused', problems: LoadPlanProblem[] }

/** The deepest sag with a person at any of the stations. */
function deepestSag(spanFt: number, loads: BeamLoad[], personLb: number): number {
  const sweep = spanSweeper(spanFt, 0, loads.length)
  const own = sweepLoads(spanFt, loads)
  let deepest = 0
  for (let station = 1; station < STATIONS; station++) {
    const atFt = spanFt * station / STATIONS
    deepest = Math.max(deepest, sweep(own, { lbPerFt: 0, fromFt: atFt, toFt: atFt, pointLb: personLb }).deflectionLbFt3)
  }
  return deepest
}

/** A what-if, never part of a verdict: a person on one joist, alone and on top of what each joist carries. */
export function personOnJoist(field: LoadField, items: PlacedItem[], personLb = PERSON_LB): PersonOnJoist {
  const problems = checkLoadPlan(field, items)
  if (problems.length > 0) return { kind: 'refused', problems }
  if (field.ratedPsf === 0) return { kind: 'nothing-allowed', personLb }
  const { spanFt } = field
  const rated = ratedEffects(field)
  // The moment is greatest under the person, P·x(L−x)/L at x, the same curve as an even load of 2P/L: one exact sum.
  const envelope: BeamLoad = { kind: 'uniform', lbPerFt: 2 * personLb / spanFt, fromFt: 0, toFt: spanFt }
  const ratios = (loads: BeamLoad[]): PersonRatios => {
    const peak = maxMoment(traceSpan(spanFt, [...loads, envelope]))
    const momentRatio = peak.size / rated.momentLbFt
    const deflectionRatio = deepestSag(spanFt, loads, personLb) / rated.deflectionLbFt3
    return { momentRatio, deflectionRatio, atFt: peak.atFt, share: Math.max(momentRatio, deflectionRatio) }
  }
  const withItems = joistLoads(field, items).map(ratios)
  const worstJoist = withItems.reduce((worst, joist, index) => joist.share > (withItems[worst]?.share ?? 0) ? index : worst, 0)
  return { kind: 'person', personLb, alone: ratios([]), withItems, worstJoist }
}
