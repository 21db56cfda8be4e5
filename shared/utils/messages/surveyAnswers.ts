import type { AtticSurvey, Hole, JoistField, Notch, Strongback } from '../../types/attic'
import { formatArea, formatInches, formatLength, formatNumber, type UnitSystem } from '../units'
import {
  ACCESS_WORDS, CONDITION_CHOICES, DECK_WORDS, FINISH_WORDS, FRAMING_WORDS, GRADE_WORDS, INSULATION_WORDS, NOTCH_EDGE_WORDS, NOTCH_PLACE_WORDS, SPECIES_WORDS, type Wording,
} from './atticWords'

/** Each answer of a survey by its name, its value, and in words: what two surveys are compared by. */
export interface SurveyAnswer<T> { label: string, of: (from: T) => unknown, words: (from: T, system: UnitSystem) => string }

const NOT_KNOWN = 'not known'
const chosen = <V>(words: readonly Wording<V>[], value: V): string => words.find(word => word.value === value)?.label ?? NOT_KNOWN
const yesNo = (value: boolean | null | undefined) => value === undefined ? 'not asked' : value === null ? NOT_KNOWN : value ? 'yes' : 'no'
const inches = (value: number | null, system: UnitSystem) => value === null ? NOT_KNOWN : formatInches(value, system)
const feet = (value: number | null, system: UnitSystem) => value === null ? NOT_KNOWN : formatLength(value, system)
const listed = (parts: string[]) => parts.length === 0 ? 'none' : parts.join('; ')

export const SURVEY_ANSWERS: readonly SurveyAnswer<AtticSurvey>[] = [
  { label: 'Framing', of: s => s.framing, words: s => chosen(FRAMING_WORDS, s.framing) },
  { label: 'Way in', of: s => s.access, words: s => chosen(ACCESS_WORDS, s.access) },
  { label: 'Opening, width', of: s => s.openingWidthIn, words: (s, system) => inches(s.openingWidthIn, system) },
  { label: 'Opening, length', of: s => s.openingLengthIn, words: (s, system) => inches(s.openingLengthIn, system) },
  { label: 'Clear height', of: s => s.clearHeightIn, words: (s, system) => inches(s.clearHeightIn, system) },
  { label: 'Room to live in', of: s => s.habitable, words: s => yesNo(s.habitable) },
  { label: 'Ceiling finish', of: s => s.ceilingFinish, words: s => chosen(FINISH_WORDS, s.ceilingFinish) },
  { label: 'Insulation', of: s => s.insulation.material, words: s => chosen(INSULATION_WORDS, s.insulation.material) },
  { label: 'Depth of insulation', of: s => s.insulation.depthIn, words: (s, system) => inches(s.insulation.depthIn, system) },
  { label: 'Boards to walk on', of: s => s.deck, words: s => chosen(DECK_WORDS, s.deck) },
  { label: 'Area of the boards', of: s => s.deckAreaFt2 ?? null, words: (s, system) => (s.deckAreaFt2 ?? null) === null ? NOT_KNOWN : formatArea(s.deckAreaFt2!, system) },
  { label: 'Things stay over ten years', of: s => s.standsOverTenYears ?? null, words: s => yesNo(s.standsOverTenYears ?? null) },
  {
    label: 'State of the wood', of: s => s.conditions === null ? null : [...s.conditions].sort(),
    words: s => s.conditions === null ? 'nobody has looked' : s.conditions.length === 0 ? 'looked, nothing found' : listed(s.conditions.map(condition => chosen(CONDITION_CHOICES, condition))),
  },
]

const notchWords = (notch: Notch, system: UnitSystem) =>
  `${inches(notch.depthIn, system)} deep, ${inches(notch.lengthIn, system)} long, ${chosen(NOTCH_PLACE_WORDS, notch.place).toLowerCase()}, ${chosen(NOTCH_EDGE_WORDS, notch.edge).toLowerCase()}`
const holeWords = (hole: Hole, system: UnitSystem) => `${inches(hole.diameterIn, system)} wide, ${inches(hole.edgeDistanceIn, system)} from the edge`
export const sectionWords = ({ size, breadthIn, depthIn }: Pick<Strongback, 'size' | 'breadthIn' | 'depthIn'>, system: UnitSystem): string =>
  breadthIn !== null && depthIn !== null ? `${formatInches(breadthIn, system)} × ${formatInches(depthIn, system)}` : size ?? NOT_KNOWN
export const liesFlat = ({ breadthIn, depthIn }: Pick<Strongback, 'breadthIn' | 'depthIn'>): boolean => breadthIn !== null && depthIn !== null && breadthIn > depthIn
const strongbackWords = (strongback: Strongback, system: UnitSystem) =>
  `${sectionWords(strongback, system)}, ${liesFlat(strongback) ? 'flat' : 'on edge'}, ${formatLength(strongback.atFt, system)} from the wall, ${strongback.sound === null ? 'state not known' : strongback.sound ? 'sound' : 'not sound'}`
const layoutWords = ({ layout }: JoistField, system: UnitSystem) => layout
  ? `${formatLength(layout.leftFt, system)} from the left, ${formatLength(layout.frontFt, system)} from the front, joists run ${layout.joistsRun === 'left-right' ? 'from left to right' : 'from front to back'}`
  : 'not said'

export const FIELD_ANSWERS: readonly SurveyAnswer<JoistField>[] = [
  { label: 'Name', of: f => f.name, words: f => f.name },
  { label: 'Size', of: f => [f.size, f.breadthIn, f.depthIn], words: sectionWords },
  { label: 'Spacing', of: f => f.spacingIn, words: (f, system) => inches(f.spacingIn, system) },
  { label: 'Clear span', of: f => f.spanFt, words: (f, system) => feet(f.spanFt, system) },
  { label: 'How many joists', of: f => f.joistCount, words: f => f.joistCount === null ? NOT_KNOWN : formatNumber(f.joistCount) },
  { label: 'Both ends on bearing walls', of: f => f.bothEndsBear ?? null, words: f => yesNo(f.bothEndsBear) },
  { label: 'Wood on the wall', of: f => f.bearingLengthIn, words: (f, system) => inches(f.bearingLengthIn, system) },
  { label: 'Wood', of: f => f.species, words: f => chosen(SPECIES_WORDS, f.species) },
  { label: 'Grade', of: f => f.grade, words: f => chosen(GRADE_WORDS, f.grade) },
  { label: 'Top edge held', of: f => f.topEdgeBraced, words: f => yesNo(f.topEdgeBraced) },
  { label: 'Put in before June 2013', of: f => f.installedBeforeJune2013, words: f => yesNo(f.installedBeforeJune2013) },
  { label: 'Stamp and date proven', of: f => f.preJune2013StampProven, words: f => yesNo(f.preJune2013StampProven) },
  { label: 'Where it lies', of: f => f.layout ?? null, words: layoutWords },
  { label: 'Notches', of: f => f.notches, words: (f, system) => listed(f.notches.map(notch => notchWords(notch, system))) },
  { label: 'Holes', of: f => f.holes, words: (f, system) => listed(f.holes.map(hole => holeWords(hole, system))) },
  { label: 'Strongbacks', of: f => f.strongbacks, words: (f, system) => listed(f.strongbacks.map(strongback => strongbackWords(strongback, system))) },
]
