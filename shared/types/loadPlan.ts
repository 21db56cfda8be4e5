import type { CapacityLimit, JoistMeasure } from './atticRating'
import type { Framing } from './attic'

/** Load against rating: within below 80 %, near 80 to 100 %, over above 100 %; ours. */
export const LOAD_STATES = ['within', 'near', 'over'] as const
export type LoadState = typeof LOAD_STATES[number]

/** Parallel joists at y = 0, spacing, 2 spacings …, simple spans 0 … spanFt along x between two bearing walls. */
export interface LoadField {
  spanFt: number
  spacingIn: number
  joistCount: number
  ratedPsf: number
  joistEiLbIn2: number
  strongbacks: { atFt: number, eiLbIn2: number }[]
}

/** A weight over a rectangle of the field: x along the joists from one bearing wall, y across them from the first joist. */
export interface PlacedItem {
  id: string
  xFt: number
  yFt: number
  lengthFt: number
  widthFt: number
  weightLb: number
}

export interface JoistRatios { momentRatio: number, deflectionRatio: number }

export interface LoadPlanAnswer {
  totalLb: number
  ratedTotalLb: number
  joists: (JoistRatios & { utilisation: number })[]
  /** What strongbacks would make of it; the same as `joists` where there is none. */
  withStrongbacks: JoistRatios[]
}

/** One joist's own strength against heavy things near its ends, and the dead load it carries already. */
export interface JoistMember {
  depthIn: number
  shearLb: number
  bearingLb: number
  deadPsf: number
}

export type LoadPlanProblemCode
  = | 'not-positive' | 'negative' | 'not-whole' | 'too-few-joists' | 'too-many-joists' | 'span-too-long' | 'spacing-not-plausible' | 'outside-field' | 'outside-span'

/** Why a plan cannot be calculated; `at` names the part and `measure` the entry to mend. */
export interface LoadPlanProblem {
  code: LoadPlanProblemCode
  at: { part: 'field' } | { part: 'item', id: string } | { part: 'strongback', index: number }
  measure: string
  value: number
  limit: number | null
}

export type PlanLimit = 'moment' | Exclude<CapacityLimit, 'bending'>

export interface JudgedJoist extends JoistRatios {
  shearRatio: number
  bearingRatio: number
  /** The greatest of the four. */
  utilisation: number
  limit: PlanLimit
  state: LoadState
  loadLb: number
  /** Moment and deflection of the joist alone, and if strongbacks shared the load. */
  own: JoistRatios
  withStrongbacks: JoistRatios
}

export interface JudgedItem {
  id: string
  /** Weight over footprint. */
  pressurePsf: number
  /** Denser than the rating and in the middle half of the span: flagged even where the joists pass. */
  heavyInMiddle: boolean
  /** The most used joist under the item; null where it weighs nothing. */
  worstJoist: number | null
  utilisation: number
  state: LoadState
}

export type JudgedPlan
  = | {
    kind: 'judged'
    totalLb: number
    ratedTotalLb: number
    totalRatio: number
    /** The greatest of every joist's utilisation and the total's ratio. */
    utilisation: number
    state: LoadState
    worstJoist: number
    joists: JudgedJoist[]
    items: JudgedItem[]
    /** An engineer accepts the strongbacks, so they count in moment and deflection. */
    strongbacksCount: boolean
    /** No joist was described, so the weakest was taken for shear and bearing. */
    memberAssumed: boolean
  }
  /** Rating 0: anything stored is over. */
  | { kind: 'nothing-allowed', totalLb: number, itemIds: string[], state: LoadState }
  | { kind: 'refused', problems: LoadPlanProblem[] }

/** A surveyed joist field made ready for a load plan, or why there is none. */
export type LoadFieldAnswer
  = | { kind: 'field', fieldName: string, field: LoadField, member: JoistMember, strongbacksCount: boolean, memberAssumed: boolean }
    | { kind: 'not-joists', fieldName: string, framing: Exclude<Framing, 'rafters-and-joists'> }
    | { kind: 'measures-missing', fieldName: string, missing: (Exclude<JoistMeasure, 'size'> | 'joistCount')[] }
