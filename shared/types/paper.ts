import type { AtticRating, RatingCaution, RatingReason } from './atticRating'
import type { ContentState } from './contents'

export const PAPER_SIZES = ['letter', 'a4'] as const
export type PaperSize = typeof PAPER_SIZES[number]

/** Whom to ask, as every printed paper names them. */
export interface PaperContact { organisationName: string, phone: string | null }

/** The heaviest box whose middle is no further from the nearer bearing wall than this, alone on its joists. */
export interface HatchCardRow {
  toFt: number
  /** Already rounded down for print, in pounds. */
  weightLb: number
  /** joist: strength decides; middle: nothing denser than the rating in the middle half; ask-first: no box above this goes up unasked. */
  decidedBy: 'joist' | 'middle' | 'ask-first'
}

export interface HatchCardField {
  number: number
  name: string
  spanFt: number
  acrossFt: number
  joistCount: number
  ratedTotalLb: number
  /** Null where nothing may be added, or the joists were not measured well enough. */
  rows: HatchCardRow[] | null
}

/** What stands on a hatch card, as numbers and codes; sentences in shared/utils/messages/hatchCardMessages.ts. */
export interface HatchCardFacts {
  state: ContentState
  /** Something may be put up there as things stand. */
  mayStore: boolean
  isTrussed: boolean
  ratedPsf: number | null
  basis: AtticRating['basis'] | null
  reasons: RatingReason[]
  cautions: RatingCaution[]
  fields: HatchCardField[]
  unmeasuredFields: string[]
  storedLb: number
  itemCount: number
  surveyedOn: string | null
  boxSideFt: number
}
