import type { AtticRating } from './atticRating'
import type { JudgedPlan, LoadFieldAnswer, LoadState, PlanLimit } from './loadPlan'

/** How an attic stands: the load states, and what keeps it from having one. */
export const CONTENT_STATES = ['empty', 'within', 'near', 'over', 'hold', 'no-storage', 'unsurveyed'] as const
export type ContentState = typeof CONTENT_STATES[number]

export interface JudgedField {
  /** From 1, in the order of the survey. */
  number: number
  name: string
  answer: LoadFieldAnswer
  /** Null where the joists of this field are not measured well enough to draw. */
  plan: JudgedPlan | null
}

/** Contents of an attic against its rating: total with its band, each field's plan, and one verdict. */
export interface JudgedContents {
  rating: AtticRating | null
  state: ContentState
  itemCount: number
  totalLb: number
  lowLb: number
  highLb: number
  /** Rated psf over the measured fields; null while no field can be measured or nothing is rated. */
  ratedTotalLb: number | null
  /** 0 to 1, that the true total is above the rated one. */
  chanceOfExceeding: number | null
  /** The greatest of the total's share and every joist's; null where there is nothing to hold it against. */
  utilisation: number | null
  worstJoist: { fieldNumber: number, fieldName: string, joistNumber: number, utilisation: number, limit: PlanLimit, state: LoadState } | null
  heavyInMiddle: string[]
  /** Items that stand outside the measured joists. */
  outside: string[]
  fields: JudgedField[]
}
