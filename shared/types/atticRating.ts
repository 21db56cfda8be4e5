import type { AtticClass, Condition, DocumentKind, Framing, Grade, InsulationMaterial, Size, Species, StampedGrade } from './attic'

/** What decided the rating. */
export const RATING_BASES = ['hold', 'document', 'framing', 'class', 'joists', 'unverified'] as const
export type RatingBasis = typeof RATING_BASES[number]

export const CAPACITY_LIMITS = ['bending', 'deflection', 'shear', 'bearing'] as const
export type CapacityLimit = typeof CAPACITY_LIMITS[number]

/** Codes and numbers; the sentence for each is written on the screen side. */
export type NotchProblem
  = | { code: 'notch-too-deep', depthIn: number, limitIn: number, fieldName: string }
    | { code: 'notch-too-long', lengthIn: number, limitIn: number, fieldName: string }
    | { code: 'notch-in-middle-third', fieldName: string }
    | { code: 'notch-in-bottom-of-thick-joist', breadthIn: number, limitIn: number, fieldName: string }
    | { code: 'notch-not-measured', fieldName: string | null }

export type HoleProblem
  = | { code: 'hole-too-large', diameterIn: number, limitIn: number, fieldName: string }
    | { code: 'hole-near-edge', distanceIn: number, limitIn: number, fieldName: string }
    | { code: 'hole-near-another', distanceIn: number, limitIn: number, fieldName: string }
    | { code: 'hole-not-measured', fieldName: string | null }

export type HoldReason = { code: 'condition', condition: Condition } | { code: 'earlier-hold', foundOn: string } | NotchProblem | HoleProblem

export type ClassReason
  = | { code: 'habitable', psf: number }
    | { code: 'fixed-stairs', psf: number }
    | { code: 'limited-storage', psf: number, clearHeightIn: number, openingWidthIn: number, openingLengthIn: number }
    | { code: 'clear-height-too-low', clearHeightIn: number, limitIn: number }
    | { code: 'clear-height-unknown', limitIn: number }
    | { code: 'opening-too-small', widthIn: number, lengthIn: number, limitWidthIn: number, limitLengthIn: number }
    | { code: 'opening-unknown', limitWidthIn: number, limitLengthIn: number }
    | { code: 'no-access' }

export type RatingReason
  = | HoldReason
    | ClassReason
    | { code: 'documented', kind: DocumentKind, psf: number, writtenOn: string, writtenBy: string }
    | { code: 'documented-part', psf: number, area: string }
    | { code: 'trusses' }
    | { code: 'framing-unknown' }
    | { code: 'joists-hold-class', psf: number, allowedPsf: number, fieldName: string }
    | { code: 'joists-hold-less', psf: number, classPsf: number, governedBy: CapacityLimit, fieldName: string }
    | { code: 'joists-not-covered', psf: number, classPsf: number, fieldNames: string[] }
    | { code: 'bearing-walls-unsure', psf: number, classPsf: number, fieldNames: string[] }
    | { code: 'joists-not-measured', psf: number, classPsf: number, fieldNames: string[] }

export type RatingCaution
  = | { code: 'estimate-only' }
    | { code: 'local-amendments', basisName: string }
    | { code: 'condition-not-inspected' }
    | { code: 'hold-lifted', kind: DocumentKind, writtenOn: string, writtenBy: string }
    | { code: 'document-not-attached', kind: DocumentKind }
    | { code: 'document-covers-part', psf: number | null, area: string }
    | { code: 'document-not-for-framing', kind: DocumentKind, framing: Framing }
    | { code: 'document-before-survey', writtenOn: string, surveyedOn: string }
    | { code: 'joists-below-access-load', allowedPsf: number, accessPsf: number, fieldName: string }
    | { code: 'insulation-covers-joists', insulationDepthIn: number, joistDepthIn: number, fieldName: string }
    | { code: 'insulation-heavy-for-board', insulationPsf: number, limitPsf: number, fieldName: string }
    | { code: 'no-deck', deckAreaFt2: number | null }
    | { code: 'notched-within-limits', fieldName: string }
    | { code: 'bored-within-limits', fieldName: string }
    | JoistAssumption

/** Something taken because it was not entered, on the safe side. */
export type JoistAssumption
  = | { code: 'no-stamp-weakest-grade', species: Species, grade: StampedGrade, fieldName: string }
    | { code: 'bearing-walls-not-asked', fieldName: string }
    | { code: 'stands-over-ten-years', cd: number, fieldName: string }
    | { code: 'bearing-length-assumed', bearingLengthIn: number, fieldName: string }
    | { code: 'top-edge-unbraced', cl: number, fieldName: string }
    | { code: 'southern-pine-lower-values', fieldName: string }
    | { code: 'finish-taken-as-plaster', fieldName: string }
    | { code: 'dead-load-floor', builtUpPsf: number, takenPsf: number, fieldName: string }
    | { code: 'dead-load-part-assumed', part: 'ceiling' | 'insulation' | 'deck', psf: number, fieldName: string }
    | { code: 'few-joists-no-sharing', joistCount: number | null, fieldName: string }
    | { code: 'size-between-table-sizes', depthIn: number, takenAs: Size | 'over 2x12', fieldName: string }

export interface JoistInputs {
  species: Species
  grade: StampedGrade
  gradeAsEntered: Grade | 'unknown'
  breadthIn: number
  depthIn: number
  spacingIn: number
  spanFt: number
  bearingLengthIn: number
  deflectionDivisor: number
  deadPsf: number
  insulationMaterial: InsulationMaterial
}

/** The numbers between what was entered and the four limits, so that each can be followed. */
export interface CapacityWorking {
  lumber: { fbPsi: number, fvPsi: number, fcPerpPsi: number, ePsi: number, eminPsi: number, source: string }
  section: { areaIn2: number, sectionModulusIn3: number, inertiaIn4: number }
  fbPrimePsi: number
  fvPrimePsi: number
  /** From the section where shear is looked at to the middle of the span. */
  shearArmIn: number
  dead: { ceilingPsf: number, insulationPsf: number, deckPsf: number, joistsPsf: number }
}

/** What the joists of one field can take, as stored live load over the whole field. */
export interface JoistCapacity {
  kind: 'capacity'
  fieldName: string
  allowedPsf: number
  governedBy: CapacityLimit
  bendingPsf: number
  deflectionPsf: number
  shearPsf: number
  bearingPsf: number
  inputs: JoistInputs
  factors: { cf: number, cr: number, cd: number, cl: number, cm: number, ct: number }
  eiLbIn2: number
  working: CapacityWorking
  assumptions: JoistAssumption[]
}

export const JOIST_MEASURES = ['size', 'spacingIn', 'spanFt'] as const
export type JoistMeasure = typeof JOIST_MEASURES[number]

/** No capacity: not joists (trusses and unknown framing are never calculated); or the measures listed are missing or not possible, or the joist is outside what the tables cover. */
export type JoistCapacityAnswer
  = | JoistCapacity
    | { kind: 'not-joists', fieldName: string, framing: Exclude<Framing, 'rafters-and-joists'> }
    | { kind: 'measures-missing', fieldName: string, missing: JoistMeasure[] }
    | { kind: 'not-covered', fieldName: string, measure: 'breadthIn' | 'depthIn' | 'spanFt' | 'slenderness', value: number, limit: number }

export interface AtticRating {
  /** Stored goods, psf. 0 = nothing may be stored. */
  ratedPsf: number
  /** What the code asks of such an attic (10 for access where nothing is stored); null when framing has no class. */
  classPsf: number | null
  atticClass: AtticClass | null
  basis: RatingBasis
  /** Suspended until inspected. */
  hold: boolean
  reasons: RatingReason[]
  cautions: RatingCaution[]
  /** One answer per joist field; absent for trusses and unknown framing. */
  joistCheck?: JoistCapacityAnswer[]
}
