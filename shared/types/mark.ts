/** A mark is one crack, nail-pop group, sag or stain being followed on a ceiling. Lengths and widths in mm. */

export const MARK_KINDS = ['crack', 'nail-pops', 'sag', 'stain'] as const
export type MarkKind = typeof MARK_KINDS[number]

/** What a reading of each kind of mark measures, and in which unit `Reading.value` is kept. */
export const READING_QUANTITIES = {
  'crack': { quantity: 'width', unit: 'mm' },
  'nail-pops': { quantity: 'count', unit: 'pops' },
  'sag': { quantity: 'drop', unit: 'mm' },
  'stain': { quantity: 'size', unit: 'mm' },
} as const satisfies Record<MarkKind, { quantity: string, unit: 'mm' | 'pops' }>

export const MARK_PLACES = ['middle', 'wall-ceiling-corner', 'light-or-vent', 'above-door-or-window', 'along-a-beam', 'other'] as const
export type MarkPlace = typeof MARK_PLACES[number]

/** Truss uplift opens gaps at interior walls, so the wall matters where the mark sits in a corner. */
export const WALL_TYPES = ['interior', 'outside', 'not-at-a-wall', 'not-known'] as const
export type WallType = typeof WALL_TYPES[number]

export const CRACK_SHAPES = ['straight-line', 'wandering-line', 'slanting-line', 'web-of-lines', 'gap-along-wall'] as const
export const POP_SHAPES = ['single-bump', 'bumps-in-a-row', 'scattered-bumps'] as const
export const SAG_SHAPES = ['shallow-dish', 'long-dip', 'round-bulge'] as const
export const STAIN_SHAPES = ['ring', 'patch', 'streak'] as const
export const SHAPES_BY_KIND = {
  'crack': CRACK_SHAPES,
  'nail-pops': POP_SHAPES,
  'sag': SAG_SHAPES,
  'stain': STAIN_SHAPES,
} as const
export type CrackShape = typeof CRACK_SHAPES[number]
export type MarkShape = CrackShape | typeof POP_SHAPES[number] | typeof SAG_SHAPES[number] | typeof STAIN_SHAPES[number]
export const MARK_SHAPES = [...CRACK_SHAPES, ...POP_SHAPES, ...SAG_SHAPES, ...STAIN_SHAPES] as const

export const DIRECTIONS = ['along-joists', 'across-joists', 'slanting', 'not-known'] as const
export type Direction = typeof DIRECTIONS[number]

export const READING_METHODS = ['guess', 'coin-or-card', 'ruler', 'photo-with-scale', 'gauge-card', 'tell-tale', 'calipers', 'count', 'string-line'] as const
export type ReadingMethod = typeof READING_METHODS[number]

export const METHODS_BY_KIND = {
  'crack': ['guess', 'coin-or-card', 'ruler', 'photo-with-scale', 'gauge-card', 'tell-tale', 'calipers'],
  'nail-pops': ['count'],
  'sag': ['guess', 'ruler', 'string-line'],
  'stain': ['guess', 'ruler', 'photo-with-scale'],
} as const satisfies Record<MarkKind, readonly ReadingMethod[]>

/** Things everybody has at hand to hold against a crack, thinnest first. Limits in mm: shared/utils/movement/widthComparisons.ts. */
export const WIDTH_COMPARISONS = ['hair', 'under-card', 'card', 'one-coin', 'two-coins', 'finger', 'wider'] as const
export type WidthComparison = typeof WIDTH_COMPARISONS[number]

export const STAIN_STATES = ['none', 'dry', 'damp', 'dripping'] as const
export type StainState = typeof STAIN_STATES[number]

export const DOOR_STATES = ['no-change', 'stick-a-bit', 'will-not-close', 'not-known'] as const
export type DoorState = typeof DOOR_STATES[number]

export const SOUND_STATES = ['none', 'once', 'repeated'] as const
export type SoundState = typeof SOUND_STATES[number]

export const CHANGES_ABOVE = ['none', 'added', 'removed', 'moved', 'someone-walked-there', 'not-known'] as const
export type ChangeAbove = typeof CHANGES_ABOVE[number]

export const RECENT_EVENTS = ['heavy-rain', 'storm', 'snow', 'leak', 'works-nearby', 'new-insulation', 'heating-or-cooling-work', 'impact', 'earthquake'] as const
export type RecentEvent = typeof RECENT_EVENTS[number]

export const TIP_STATES = ['not-past', 'past', 'no-pencil-mark'] as const
export type TipState = typeof TIP_STATES[number]

/**
 * Any one of these is answered at once with the leave-the-room advice.
 * Common practice, with the warning signs of a state building authority, HUD NSPIRE ceiling standard v3.0 and UK HHSRS hazard 29.
 */
export const DANGER_SIGNS = [
  'bulge-or-growing-sag',
  'board-dropping',
  'sounds-with-change',
  'bits-falling',
  'wet-and-bulging',
  'water-dripping',
  'pops-in-a-line-together',
  'cornice-dropping',
  'opening-while-doors-bind',
  'fast-widening',
  'after-an-impact',
] as const
export type DangerSign = typeof DANGER_SIGNS[number]

export const ACTIVITIES = ['too-few-readings', 'dormant', 'watch', 'active'] as const
export type Activity = typeof ACTIVITIES[number]

/** Where on the ceiling, as shares of its length and width from the corner the room sketch starts at: 0 to 1. */
export interface CeilingPin { xShare: number, yShare: number }

/** What a lay person answers about one ceiling mark. Null means not asked or 'cannot tell', which is an answer. */
export interface ObservationAnswers {
  kind: MarkKind
  roomId: string
  pin: CeilingPin | null
  place: MarkPlace | null
  shape: MarkShape | null
  direction: Direction
  wallType: WallType | null
  widthComparison: WidthComparison | null
  widthMm: number | null
  widthMethod: ReadingMethod | null
  lengthMm: number | null
  tip: TipState | null
  popCount: number | null
  sagDropMm: number | null
  /** Distance between the ends of the string or straight edge the drop was taken from. */
  sagSpanMm: number | null
  stain: StainState
  stainSizeMm: number | null
  doors: DoorState
  sounds: SoundState
  changeAbove: ChangeAbove
  recentEvents: RecentEvent[]
  heatingOn: boolean | null
  humidityPercent: number | null
  dangerSigns: DangerSign[]
  /** The day the person first saw it, not the day of the report. */
  firstSeenOn: string | null
  note: string | null
}

/** A report before anything was asked; `kind` and `roomId` have no default. */
export const NOTHING_ASKED: Omit<ObservationAnswers, 'kind' | 'roomId'> = {
  pin: null, place: null, shape: null, direction: 'not-known', wallType: null,
  widthComparison: null, widthMm: null, widthMethod: null, lengthMm: null, tip: null, popCount: null,
  sagDropMm: null, sagSpanMm: null, stain: 'none', stainSizeMm: null, doors: 'not-known', sounds: 'none',
  changeAbove: 'not-known', recentEvents: [], heatingOn: null, humidityPercent: null, dangerSigns: [], firstSeenOn: null, note: null,
}

/** One dated measurement of a mark. `value` is in the unit READING_QUANTITIES names for the mark's kind. */
export interface Reading {
  id: string
  markId: string
  takenOn: string
  value: number
  /** Standard uncertainty in the same unit as `value`. */
  sigma: number
  method: ReadingMethod
  /** Raised by one at every repair: a trend never runs across one. */
  segment: number
  /** Bounds in the same unit, for 'thicker than … thinner than …'; `atLeast` alone when there is no upper bound. */
  atLeast: number | null
  atMost: number | null
  lengthMm: number | null
  /** For a sag: between the ends of the string. */
  spanMm: number | null
  stain: StainState | null
  dangerSigns: DangerSign[]
  note: string | null
}

export interface Mark {
  id: string
  unitId: string
  roomId: string
  /** The attic above, when there is one. */
  atticId: string | null
  kind: MarkKind
  place: MarkPlace | null
  shape: MarkShape | null
  direction: Direction
  wallType: WallType | null
  pin: CeilingPin | null
  firstSeenOn: string
  segment: number
}
