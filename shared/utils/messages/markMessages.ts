import type {
  ChangeAbove, DangerSign, Direction, DoorState, MarkKind, MarkPlace, MarkShape, ReadingMethod,
  RecentEvent, SoundState, StainState, WallType, WidthComparison,
} from '../../types/mark'
import type { WidthClass, WidthClassNumber } from '../movement/widthClass'
import { WIDTH_CLASS_CAVEAT } from './safety'

export const MARK_KIND_WORDS: Record<MarkKind, string> = {
  'crack': 'Crack', 'nail-pops': 'Nail pops', 'sag': 'Sag', 'stain': 'Stain',
}

export const MARK_PLACE_WORDS: Record<MarkPlace, string> = {
  'middle': 'Out in the middle', 'wall-ceiling-corner': 'Where wall and ceiling meet', 'light-or-vent': 'At a light or vent',
  'above-door-or-window': 'Above a door or window', 'along-a-beam': 'Along a beam', 'other': 'Somewhere else',
}

export const WALL_TYPE_WORDS: Record<WallType, string> = {
  'interior': 'A wall between rooms', 'outside': 'An outside wall', 'not-at-a-wall': 'Not at a wall', 'not-known': 'Cannot tell',
}

export const MARK_SHAPE_WORDS: Record<MarkShape, string> = {
  'straight-line': 'One long straight line', 'wandering-line': 'A line that wanders', 'slanting-line': 'A slanting line',
  'web-of-lines': 'A web of many lines', 'gap-along-wall': 'A gap along the wall',
  'single-bump': 'One round bump', 'bumps-in-a-row': 'Bumps in a row', 'scattered-bumps': 'Bumps here and there',
  'shallow-dish': 'A shallow dish', 'long-dip': 'A long dip', 'round-bulge': 'A round bulge',
  'ring': 'A ring', 'patch': 'A patch', 'streak': 'A streak',
}

export const DIRECTION_WORDS: Record<Direction, string> = {
  'along-joists': 'Along the joists', 'across-joists': 'Across the joists', 'slanting': 'At a slant', 'not-known': 'Cannot tell',
}

export const READING_METHOD_WORDS: Record<ReadingMethod, string> = {
  'guess': 'By eye', 'coin-or-card': 'Coin or card', 'ruler': 'Ruler', 'photo-with-scale': 'Photo with a scale in it',
  'gauge-card': 'Printed gauge card', 'tell-tale': 'Tell-tale', 'calipers': 'Calipers on pins', 'count': 'Counted', 'string-line': 'String line',
}

export const WIDTH_COMPARISON_WORDS: Record<WidthComparison, string> = {
  'hair': 'Thin as a hair', 'under-card': 'Wider than a hair, a bank card does not go in', 'card': 'A bank card goes in, a dime does not',
  'one-coin': 'A dime goes in, a nickel just about', 'two-coins': 'Two nickels together just about go in',
  'finger': 'Wider than two nickels, up to a fingertip', 'wider': 'Wider than a fingertip',
}

export const STAIN_STATE_WORDS: Record<StainState, string> = {
  none: 'No stain', dry: 'Dry', damp: 'Damp', dripping: 'Dripping',
}

export const DOOR_STATE_WORDS: Record<DoorState, string> = {
  'no-change': 'They close as before', 'stick-a-bit': 'They stick a little', 'will-not-close': 'One will not close', 'not-known': 'Cannot tell',
}

export const SOUND_STATE_WORDS: Record<SoundState, string> = {
  none: 'No sounds', once: 'A crack or pop, once', repeated: 'Again and again',
}

export const CHANGE_ABOVE_WORDS: Record<ChangeAbove, string> = {
  'none': 'Nothing changed', 'added': 'Things were added', 'removed': 'Things were taken out', 'moved': 'Things were moved',
  'someone-walked-there': 'Somebody walked up there', 'not-known': 'Do not know',
}

export const RECENT_EVENT_WORDS: Record<RecentEvent, string> = {
  'heavy-rain': 'Heavy rain', 'storm': 'A storm', 'snow': 'Snow on the roof', 'leak': 'A leak', 'works-nearby': 'Building work nearby',
  'new-insulation': 'New insulation', 'heating-or-cooling-work': 'Work on heating or cooling', 'impact': 'Something hit the house or ceiling',
  'earthquake': 'An earthquake',
}

export const DANGER_SIGN_WORDS: Record<DangerSign, string> = {
  'bulge-or-growing-sag': 'The ceiling bulges, or a sag is growing',
  'board-dropping': 'A board is coming down',
  'sounds-with-change': 'Cracking or popping sounds, and something looks different',
  'bits-falling': 'Bits or plaster are falling',
  'wet-and-bulging': 'The ceiling is wet and bulging',
  'water-dripping': 'Water is dripping from the ceiling',
  'pops-in-a-line-together': 'Several nail pops showed up together in one line',
  'cornice-dropping': 'A cornice is dropping',
  'opening-while-doors-bind': 'Wall and ceiling opened and doors started to bind within a day or two',
  'fast-widening': 'A crack came suddenly or is widening fast',
  'after-an-impact': 'It came after a blow, an explosion, an earthquake, or a foot through the ceiling',
}

/** Several signs as one run of words. */
export const dangerSignsWords = (signs: readonly DangerSign[]): string =>
  signs.map((sign, place) => place === 0 ? DANGER_SIGN_WORDS[sign] : DANGER_SIGN_WORDS[sign].charAt(0).toLowerCase() + DANGER_SIGN_WORDS[sign].slice(1)).join('; ')

/** What each class means for decoration (BRE Digest 251, our words). */
const WIDTH_CLASS_WORDS: Record<WidthClassNumber, string> = {
  0: 'a hairline, nothing to fill',
  1: 'fine, covered when the room is next painted',
  2: 'easily filled',
  3: 'to be opened up and patched',
  4: 'a large repair to the finish',
  5: 'a rebuild of the finish',
}

/** Class and its caveat, never one without the other. */
export function widthClassSentence(width: WidthClass): string {
  return `Width class ${width.class} of 5: ${WIDTH_CLASS_WORDS[width.class]}. ${WIDTH_CLASS_CAVEAT}`
}
