import { CHANGES_ABOVE, DANGER_SIGNS, DIRECTIONS, DOOR_STATES, MARK_PLACES, POP_SHAPES, RECENT_EVENTS, SAG_SHAPES, SOUND_STATES, STAIN_SHAPES, STAIN_STATES, WALL_TYPES, WIDTH_COMPARISONS, type MarkKind, type MarkShape } from '../../types/mark'
import { REPORT_QUESTIONS, type ReportQuestion } from '../../types/reportDraft'
import {
  CHANGE_ABOVE_WORDS, DANGER_SIGN_WORDS, DIRECTION_WORDS, DOOR_STATE_WORDS, MARK_KIND_WORDS, MARK_PLACE_WORDS, MARK_SHAPE_WORDS, RECENT_EVENT_WORDS, SOUND_STATE_WORDS,
  STAIN_STATE_WORDS, WALL_TYPE_WORDS, WIDTH_COMPARISON_WORDS,
} from '../messages/markMessages'
import { NO_ATTIC_FOR_TENANTS } from '../messages/safety'
import { LOOKS } from '../report/looks'
import { questionWords } from '../report/questionWords'
import { SAGS_BY_EYE, STAINS_BY_EYE, type SizeByEye } from '../report/sizesByEye'
import { NO_BREAK_SPACE, type UnitSystem } from '../units'

/** The report's questions as blocks of a sheet that is filled in by hand. */
export type FormPart
  = | { kind: 'ticks', label?: string, choices: readonly string[], columns: 2 | 3 | 4 }
    | { kind: 'pictures', label?: string, choices: readonly { label: string, shape: MarkShape | MarkKind | null }[] }
    | { kind: 'blanks', labels: readonly string[] }
    | { kind: 'sketch', label: string }
    | { kind: 'lines', label?: string, count: number }

export interface FormBlock { question: ReportQuestion, heading: string, lead?: string, parts: FormPart[] }

/** Danger first; then the same questions in the same order as on the phone. */
export const FORM_ORDER: readonly ReportQuestion[] = ['danger', ...REPORT_QUESTIONS.filter(question => question !== 'danger')]

const words = <T extends string>(values: readonly T[], labels: Record<T, string>) => values.map(value => labels[value])
const ticks = (choices: readonly string[], columns: 2 | 3 | 4, label?: string): FormPart => ({ kind: 'ticks', choices, columns, label })
const pictures = (shapes: readonly MarkShape[], label: string): FormPart => ({ kind: 'pictures', label, choices: shapes.map(shape => ({ label: MARK_SHAPE_WORDS[shape], shape })) })
const ifIt = (kind: MarkKind) => `If it is ${kind === 'nail-pops' ? 'round bumps' : `a ${MARK_KIND_WORDS[kind].toLowerCase()}`}`
const sizes = (list: readonly SizeByEye[], system: UnitSystem) => list.map(({ label, us, metric }) => `${label}, ${(system === 'us' ? us : metric).replaceAll(' ', NO_BREAK_SPACE)}`)

function partsOf(question: ReportQuestion, { rooms, system }: FormFor): FormPart[] {
  switch (question) {
    case 'danger': return [ticks([...words(DANGER_SIGNS, DANGER_SIGN_WORDS), 'None of these'], 2)]
    case 'room': return [ticks(rooms, 3), { kind: 'blanks', labels: ['or another room'] }]
    case 'look': return [{ kind: 'pictures', choices: LOOKS.map(({ value, label }) => ({ label, shape: value === 'crack' ? null : value })) }]
    case 'shape': return [pictures(POP_SHAPES, ifIt('nail-pops')), pictures(SAG_SHAPES, ifIt('sag')), pictures(STAIN_SHAPES, ifIt('stain'))]
    case 'where': return [ticks(words(MARK_PLACES, MARK_PLACE_WORDS), 3), ticks(words(WALL_TYPES, WALL_TYPE_WORDS), 4, 'If it is where wall and ceiling meet'), { kind: 'sketch', label: 'Draw the ceiling from above: mark the door with D, windows with W, and a cross where it is' }]
    case 'size': return [
      ticks(words(WIDTH_COMPARISONS, WIDTH_COMPARISON_WORDS), 2, `${ifIt('crack')}: how wide?`), { kind: 'blanks', labels: ['or by a ruler, in mm', `${ifIt('nail-pops')}: how many?`] },
      ticks(sizes(SAGS_BY_EYE, system), 3, `${ifIt('sag')}: how far does it hang down? Judge by eye.`), ticks(sizes(STAINS_BY_EYE, system), 3, `${ifIt('stain')}: how large, across its longest side?`),
    ]
    case 'run': return [{ kind: 'blanks', labels: [`Length from tip to tip, in ${system === 'us' ? 'ft and in' : 'm'}`] }, ticks(words(DIRECTIONS, DIRECTION_WORDS), 4, 'Which way does it run?')]
    case 'wet': return [ticks(words(STAIN_STATES, STAIN_STATE_WORDS), 4)]
    case 'changed': return [ticks(words(DOOR_STATES, DOOR_STATE_WORDS), 4, 'Doors and windows near it'), ticks(words(SOUND_STATES, SOUND_STATE_WORDS), 3, 'Sounds from the ceiling')]
    case 'around': return [
      ticks(words(CHANGES_ABOVE, CHANGE_ABOVE_WORDS), 3, `Did anything change in the attic above? Only what you know. ${NO_ATTIC_FOR_TENANTS}`),
      ticks(words(RECENT_EVENTS, RECENT_EVENT_WORDS), 3, 'Any of these in the last weeks?'), { kind: 'blanks', labels: ['First seen on (day, month, year)'] },
    ]
    case 'photos': return [ticks(['I have photos and hand them over', 'No photos'], 2)]
    case 'send': return [{ kind: 'lines', label: 'Anything else?', count: 2 }, { kind: 'blanks', labels: ['Name', 'Filled in on'] }]
  }
}

/** On paper several kinds stand side by side, so a heading speaks of all of them. */
const HEADINGS: Partial<Record<ReportQuestion, { heading: string, lead?: string }>> = {
  size: { heading: 'How large is it?', lead: 'Stay on the floor, and never stand under a sag. Hold a card or a coin to it only where you reach it with both feet on the floor.' },
  shape: { heading: 'Which is most like it? Only for bumps, a sag or a stain.' },
  run: { heading: 'If it is a crack: how long is it, and which way does it run?', lead: questionWords('run', 'crack', false).lead },
  wet: { heading: 'If it hangs or is stained: is it wet?', lead: questionWords('wet', 'stain', false).lead },
  photos: { heading: 'Have you taken photos?', lead: 'One of the whole ceiling from the doorway, one close with zoom. Never go back under a dangerous ceiling for a photo.' },
  send: { heading: 'Your own words, your name and the day' },
}

export interface FormFor { rooms: readonly string[], system: UnitSystem }

export function reportForm(about: FormFor): FormBlock[] {
  return FORM_ORDER.map(question => ({ question, ...(HEADINGS[question] ?? questionWords(question, null, false)), parts: partsOf(question, about) }))
}
