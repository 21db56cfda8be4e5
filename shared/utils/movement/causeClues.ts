import type { Confidence } from '../../types/item'
import type { MarkKind, MarkPlace, MarkShape, RecentEvent, WallType } from '../../types/mark'

export const CAUSES = [
  'truss-uplift', 'board-joint', 'fastener-pop', 'board-letting-go', 'overload', 'water-leak', 'plaster-keys',
  'house-movement', 'vibration', 'altered-framing', 'season-only', 'patch-returning',
] as const
export type Cause = typeof CAUSES[number]

export type CauseUrgency = 'watch-a-year' | 'watch' | 'look' | 'urgent-if-growing' | 'urgent'

export interface CauseClue {
  cause: Cause
  kinds: readonly MarkKind[]
  /** Empty: any. */
  places: readonly MarkPlace[]
  shapes: readonly MarkShape[]
  wallTypes: readonly WallType[]
  /** Something that happened lately and makes this likelier. */
  events: readonly RecentEvent[]
  /** Season of the widest opening, where that tells something. */
  widestIn: 'winter' | 'wet-months' | null
  urgency: CauseUrgency
  source: string
  confidence: Confidence
}

const CRACK = ['crack'] as const
const SBCA = 'SBCA/WTCA partition separation guidance; Woeste'
const BRIEF_21 = 'NPS Preservation Brief 21'
const WA = 'Western Australian building authority warning signs (2017)'

/** Pattern to likely cause: a clue with its source, never a diagnosis. Sentences in messages/causeMessages.ts. */
export const CAUSE_CLUES: readonly CauseClue[] = [
  { cause: 'board-letting-go', kinds: ['nail-pops', 'sag'], places: [], shapes: ['bumps-in-a-row', 'long-dip', 'round-bulge'], wallTypes: [], events: [], widestIn: null, urgency: 'urgent', source: WA, confidence: 'high' },
  { cause: 'water-leak', kinds: ['stain', 'sag'], places: [], shapes: ['ring', 'patch', 'streak', 'round-bulge'], wallTypes: [], events: ['heavy-rain', 'storm', 'snow', 'leak', 'heating-or-cooling-work'], widestIn: null, urgency: 'urgent-if-growing', source: 'trade pages', confidence: 'medium' },
  { cause: 'plaster-keys', kinds: ['crack', 'sag'], places: [], shapes: ['web-of-lines', 'round-bulge'], wallTypes: [], events: ['works-nearby', 'leak', 'impact'], widestIn: null, urgency: 'urgent', source: `CROSS-UK report 562; ${BRIEF_21}`, confidence: 'high' },
  { cause: 'overload', kinds: ['sag', 'crack'], places: ['middle', 'along-a-beam'], shapes: ['shallow-dish', 'long-dip', 'straight-line'], wallTypes: [], events: ['new-insulation', 'leak'], widestIn: null, urgency: 'urgent-if-growing', source: `${WA}; ${BRIEF_21} part A`, confidence: 'medium' },
  { cause: 'altered-framing', kinds: ['sag', 'crack'], places: ['above-door-or-window', 'along-a-beam', 'middle'], shapes: ['long-dip', 'straight-line', 'slanting-line'], wallTypes: [], events: ['works-nearby', 'heating-or-cooling-work'], widestIn: null, urgency: 'urgent', source: 'from memory', confidence: 'medium' },
  { cause: 'truss-uplift', kinds: CRACK, places: ['wall-ceiling-corner'], shapes: ['gap-along-wall', 'straight-line'], wallTypes: ['interior', 'not-known'], events: [], widestIn: 'winter', urgency: 'watch-a-year', source: SBCA, confidence: 'high' },
  { cause: 'board-joint', kinds: CRACK, places: ['middle', 'light-or-vent', 'other'], shapes: ['straight-line'], wallTypes: [], events: [], widestIn: 'wet-months', urgency: 'watch', source: 'SBCA research report 1607-03; Woeste and Loferski 2020', confidence: 'high' },
  { cause: 'fastener-pop', kinds: ['nail-pops'], places: [], shapes: ['single-bump', 'scattered-bumps', 'bumps-in-a-row'], wallTypes: [], events: [], widestIn: null, urgency: 'watch', source: 'trade pages', confidence: 'high' },
  { cause: 'house-movement', kinds: CRACK, places: ['above-door-or-window'], shapes: ['slanting-line', 'wandering-line'], wallTypes: [], events: ['earthquake'], widestIn: null, urgency: 'look', source: BRIEF_21, confidence: 'high' },
  { cause: 'vibration', kinds: CRACK, places: [], shapes: [], wallTypes: [], events: ['works-nearby', 'earthquake'], widestIn: null, urgency: 'look', source: 'Dowding et al., crack response to weather and blast vibration', confidence: 'high' },
  { cause: 'season-only', kinds: CRACK, places: [], shapes: ['wandering-line', 'straight-line', 'web-of-lines'], wallTypes: [], events: [], widestIn: null, urgency: 'watch', source: 'Dowding et al., crack response to weather and blast vibration', confidence: 'high' },
  { cause: 'patch-returning', kinds: CRACK, places: [], shapes: [], wallTypes: [], events: [], widestIn: null, urgency: 'watch', source: 'from memory', confidence: 'medium' },
]

export interface CluePattern {
  kind: MarkKind
  place: MarkPlace | null
  shape: MarkShape | null
  wallType: WallType | null
  recentEvents: readonly RecentEvent[]
  /** The mark was mended before and came back. */
  mendedBefore: boolean
  /** Day of the year a fitted season is highest; null while no season stands out from the readings' scatter. */
  widestOnDayOfYear: number | null
}

/** Heating season of the northern half: November to March. The other months are the wet ones for air indoors. */
function isWinter(dayOfYear: number): boolean {
  return dayOfYear < 90 || dayOfYear >= 305
}

/** Whether the mark is widest when this clue says it would be; false while the season is not known. */
function isInSeason(clue: CauseClue, widestOnDayOfYear: number | null): boolean {
  if (clue.widestIn === null || widestOnDayOfYear === null) return false
  return isWinter(widestOnDayOfYear) === (clue.widestIn === 'winter')
}

function fits<T>(allowed: readonly T[], value: T | null): boolean {
  return allowed.length === 0 || (value !== null && allowed.includes(value))
}

function scoreOf(clue: CauseClue, pattern: CluePattern): number | null {
  if (!clue.kinds.includes(pattern.kind)) return null
  if (!fits(clue.places, pattern.place) || !fits(clue.shapes, pattern.shape) || !fits(clue.wallTypes, pattern.wallType)) return null
  if (clue.cause === 'patch-returning') return pattern.mendedBefore ? 3 : null
  const events = clue.events.filter(event => pattern.recentEvents.includes(event)).length
  if (clue.cause === 'vibration') return events > 0 ? events : null
  const named = [clue.places, clue.shapes, clue.wallTypes].filter(list => list.length > 0).length
  return named + events + (isInSeason(clue, pattern.widestOnDayOfYear) ? 2 : 0)
}

/** Clues whose pattern fits, best fit first; among equals the graver one first. */
export function cluesFor(pattern: CluePattern): CauseClue[] {
  return CAUSE_CLUES
    .map((clue, order) => ({ clue, order, score: scoreOf(clue, pattern) }))
    .filter(entry => entry.score !== null)
    .sort((a, b) => b.score! - a.score! || a.order - b.order)
    .map(entry => entry.clue)
}
