/**
 * An attic as a person describes it. Every answer may be unknown: a union carries 'unknown',
 * a measure or a yes/no carries null. The calculation takes the safe side for each of them.
 */

export const FRAMINGS = ['rafters-and-joists', 'trusses', 'unknown'] as const
export type Framing = typeof FRAMINGS[number]

export const ACCESSES = ['fixed-stairs', 'pull-down-ladder', 'hatch', 'none', 'unknown'] as const
export type Access = typeof ACCESSES[number]

export const CEILING_FINISHES = ['gypsum-half-inch', 'gypsum-five-eighths', 'plaster-on-lath', 'wood-boards', 'other', 'unknown'] as const
export type CeilingFinish = typeof CEILING_FINISHES[number]

export const INSULATION_MATERIALS = ['none', 'fiberglass', 'cellulose', 'rock-wool', 'foam-board', 'other', 'unknown'] as const
export type InsulationMaterial = typeof INSULATION_MATERIALS[number]

/** Boards or panels to walk and store on. */
export const DECKS = ['none', 'partial', 'full', 'unknown'] as const
export type Deck = typeof DECKS[number]

export const CONDITIONS = ['wet', 'mouldy', 'rotten', 'insect-damaged', 'cut', 'cracked-through', 'sagging', 'notched', 'bored'] as const
export type Condition = typeof CONDITIONS[number]

export const SPECIES = ['Douglas fir-larch', 'Hem-fir', 'Southern pine', 'Spruce-pine-fir'] as const
export type Species = typeof SPECIES[number]

/** 'no stamp': no grade stamp found. A grade is entered only from a stamp, or as an inspector or engineer recorded it. */
export const GRADES = ['SS', 'No.1', 'No.2', 'No.3', 'no stamp'] as const
export type Grade = typeof GRADES[number]
export type StampedGrade = Exclude<Grade, 'no stamp'>

export const SIZES = ['2x4', '2x6', '2x8', '2x10', '2x12'] as const
export type Size = typeof SIZES[number]

/** Where along the span a notch sits; IRC R502.8.1 allows none in the middle third. */
export const NOTCH_PLACES = ['end', 'outer-third', 'middle-third', 'unknown'] as const
export type NotchPlace = typeof NOTCH_PLACES[number]

export const NOTCH_EDGES = ['top', 'bottom', 'unknown'] as const
export type NotchEdge = typeof NOTCH_EDGES[number]

export interface Notch {
  depthIn: number | null
  /** Along the joist. */
  lengthIn: number | null
  place: NotchPlace
  edge: NotchEdge
}

export interface Hole {
  diameterIn: number | null
  /** From the hole's rim to the nearest edge of the joist, top or bottom. */
  edgeDistanceIn: number | null
  /** From rim to rim of the nearest other hole, or to a notch; null when it is the only one. */
  nearestOtherIn: number | null
}

/** A board on edge across the joists, fastened to each, that makes neighbours share a load. */
export interface Strongback {
  /** Distance from the bearing wall at the start of the span. */
  atFt: number
  size: Size | null
  /** As measured; goes before `size` when given. */
  breadthIn: number | null
  depthIn: number | null
  sound: boolean | null
  /** An engineer's opinion, on file, that this strongback shares load. Only then does it count in a verdict. */
  engineerAccepts: boolean
}

export const JOIST_DIRECTIONS = ['left-right', 'front-back'] as const
export type JoistDirection = typeof JOIST_DIRECTIONS[number]

/** Where a group of joists lies in the attic, seen from above: its corner, from the attic's left and front walls. */
export interface FieldLayout { leftFt: number, frontFt: number, joistsRun: JoistDirection }

/** Parallel joists of one size, span and spacing between the same two bearing walls. */
export interface JoistField {
  name: string
  species: Species | 'unknown'
  grade: Grade | 'unknown'
  /** Dressed size; null when the joist was measured, or when neither is known. */
  size: Size | null
  /** As measured; goes before `size` when both are given. */
  breadthIn: number | null
  depthIn: number | null
  spacingIn: number | null
  /** Clear span between bearing walls, not the length of the board. */
  spanFt: number | null
  joistCount: number | null
  /** Both ends lie on bearing walls. No or null (not sure): the span is not verified. Left out: nobody was asked. */
  bothEndsBear?: boolean | null
  /** Length of wood on the wall plate; 1.5 in is taken when unknown. */
  bearingLengthIn: number | null
  /** Deck or blocking holds the top edge from rolling. */
  topEdgeBraced: boolean | null
  installedBeforeJune2013: boolean | null
  /** A stamp and a date on paper prove southern pine graded before June 2013; only then do the older, higher values apply. */
  preJune2013StampProven: boolean
  notches: Notch[]
  holes: Hole[]
  strongbacks: Strongback[]
  /** Null or left out: nobody has said where it lies. */
  layout?: FieldLayout | null
}

export interface Insulation {
  material: InsulationMaterial
  depthIn: number | null
}

export interface AtticSurvey {
  /** Day of the survey, 'YYYY-MM-DD'. */
  surveyedOn: string
  framing: Framing
  access: Access
  openingWidthIn: number | null
  openingLengthIn: number | null
  /** Greatest clear height between joists and rafters. */
  clearHeightIn: number | null
  habitable: boolean | null
  ceilingFinish: CeilingFinish
  insulation: Insulation
  deck: Deck
  /** Where boards lie on part of it. */
  deckAreaFt2?: number | null
  /** Things will stand longer than ten years: wood under lasting load carries less. */
  standsOverTenYears?: boolean | null
  /** Empty: somebody looked and found none. Null: nobody has looked. */
  conditions: Condition[] | null
  joistFields: JoistField[]
  /** Set by the server, never by a form: an earlier survey found damage. Papers decide whether the hold stands. */
  earlierHold?: { foundOn: string } | null
  /** Set by the server, never by a form: the table of loads the property goes by; none: IRC Table R301.5. */
  codeBasis?: CodeBasis | null
}

export const DOCUMENT_KINDS = ['engineer-letter', 'permit', 'truss-drawing', 'inspection-record'] as const
export type DocumentKind = typeof DOCUMENT_KINDS[number]

/** A paper on file that speaks about what this attic may hold. */
export interface AtticDocument {
  kind: DocumentKind
  /** 'YYYY-MM-DD' as written on the paper. */
  writtenOn: string
  writtenBy: string
  /** The paper itself is attached. Without it the entry neither rates nor lifts a hold. */
  attached: boolean
  /** Live load for stored goods that the paper states; null when it states none. */
  ratedPsf: number | null
  /** The writer saw the damage and states that storage may go on. */
  liftsHold: boolean
  /** The writer found the strongbacks sound and lets them share the load. Left out: no. */
  acceptsStrongbacks?: boolean
  coversWholeAttic: boolean
  /** Which part it covers, in the writer's words. */
  area: string
}

/** Classes of IRC 2018/2021 Table R301.5. */
export const ATTIC_CLASSES = ['habitable-or-fixed-stairs', 'limited-storage', 'no-storage'] as const
export type AtticClass = typeof ATTIC_CLASSES[number]

/** Live load the code asks of each class; an organisation may set another for a property, with a name and a note. */
export interface CodeBasis {
  name: string
  note: string
  psf: Record<AtticClass, number>
}
