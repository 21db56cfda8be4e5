import type { ClassReason, HoldReason, JoistCapacity, JoistCapacityAnswer, JoistMeasure, RatingReason } from '../../types/atticRating'
import type { Condition, DocumentKind } from '../../types/attic'
import { formatDay } from '../days'
import { inToMm, psfToKpa, type UnitSystem } from '../units'

/** Each reason and caution of a rating as one plain sentence. Numbers come from the reason; nothing is calculated here. */

export const CONDITION_WORDS: Record<Condition, string> = {
  'wet': 'wet',
  'mouldy': 'mouldy',
  'rotten': 'rotten',
  'insect-damaged': 'damaged by insects',
  'cut': 'cut',
  'cracked-through': 'cracked through',
  'sagging': 'sagging',
  'notched': 'notched',
  'bored': 'bored',
}

export const DOCUMENT_WORDS: Record<DocumentKind, string> = {
  'engineer-letter': 'an engineer\'s letter',
  'permit': 'a permit',
  'truss-drawing': 'truss design drawings',
  'inspection-record': 'an inspection record',
}

const figure = (value: number, digits = 1) => Number(value.toFixed(digits)).toString()
/** Figures with their unit as the reader wants them; exact enough that 19.7 never reads as 20. */
export const RATING_QUANTITIES = {
  us: { psf: (value: number) => `${figure(value)} psf`, inches: (value: number) => `${figure(value, 2)} in` },
  metric: { psf: (value: number) => `${figure(psfToKpa(value), 2)} kPa`, inches: (value: number) => `${figure(inToMm(value), 0)} mm` },
} as const
type Quantities = typeof RATING_QUANTITIES[UnitSystem]
const where = (fieldName: string | null) => fieldName ? ` (${fieldName})` : ''

function holdSentence(reason: HoldReason, told: Quantities): string {
  switch (reason.code) {
    case 'condition': return `A member is ${CONDITION_WORDS[reason.condition]}.`
    case 'earlier-hold': return `Damage was seen on ${formatDay(reason.foundOn)}. A new survey does not end the hold: an inspection record or an engineer’s letter does.`
    case 'notch-too-deep': return `A notch is ${told.inches(reason.depthIn)} deep; at most ${told.inches(reason.limitIn)} is allowed${where(reason.fieldName)}.`
    case 'notch-too-long': return `A notch is ${told.inches(reason.lengthIn)} long; at most ${told.inches(reason.limitIn)} is allowed${where(reason.fieldName)}.`
    case 'notch-in-middle-third': return `A joist is notched in the middle third of its span${where(reason.fieldName)}.`
    case 'notch-in-bottom-of-thick-joist': return `A joist ${told.inches(reason.breadthIn)} thick is notched in its bottom edge${where(reason.fieldName)}.`
    case 'notch-not-measured': return `Notches are there and have not been measured${where(reason.fieldName)}.`
    case 'hole-too-large': return `A hole is ${told.inches(reason.diameterIn)} wide; at most ${told.inches(reason.limitIn)} is allowed${where(reason.fieldName)}.`
    case 'hole-near-edge': return `A hole is ${told.inches(reason.distanceIn)} from the edge; at least ${told.inches(reason.limitIn)} is needed${where(reason.fieldName)}.`
    case 'hole-near-another': return `A hole is ${told.inches(reason.distanceIn)} from another; at least ${told.inches(reason.limitIn)} is needed${where(reason.fieldName)}.`
    case 'hole-not-measured': return `Holes are there and have not been measured${where(reason.fieldName)}.`
  }
}

function classSentence(reason: ClassReason, told: Quantities): string {
  switch (reason.code) {
    case 'habitable': return `It is a habitable attic: the code asks ${told.psf(reason.psf)}.`
    case 'fixed-stairs': return `Fixed stairs lead up: the code asks ${told.psf(reason.psf)}.`
    case 'limited-storage': return `There is height and an opening for limited storage: the code asks ${told.psf(reason.psf)}.`
    case 'clear-height-too-low': return `The clear height is ${told.inches(reason.clearHeightIn)}, less than ${told.inches(reason.limitIn)}: the code counts no storage here.`
    case 'clear-height-unknown': return `The clear height is not known. From ${told.inches(reason.limitIn)} on it may count as storage.`
    case 'opening-too-small': return `The opening is ${told.inches(reason.widthIn)} by ${told.inches(reason.lengthIn)}, smaller than ${told.inches(reason.limitWidthIn)} by ${told.inches(reason.limitLengthIn)}: the code counts no storage here.`
    case 'opening-unknown': return `The opening has not been measured. From ${told.inches(reason.limitWidthIn)} by ${told.inches(reason.limitLengthIn)} on it may count as storage.`
    case 'no-access': return 'There is no way in: the code counts no storage here.'
  }
}

/** One sentence for one reason. */
export function ratingReasonSentence(reason: RatingReason, system: UnitSystem = 'us'): string {
  const told = RATING_QUANTITIES[system]
  switch (reason.code) {
    case 'documented': return `${capital(DOCUMENT_WORDS[reason.kind])} by ${reason.writtenBy} states ${told.psf(reason.psf)}.`
    case 'documented-part': return `A paper on file allows ${told.psf(reason.psf)} for one part: ${reason.area}.`
    case 'trusses': return 'The roof is trussed. No storage unless the truss design drawings or an engineer give a figure, which can then be entered with the document attached.'
    case 'framing-unknown': return 'Nobody has told trusses from rafters here yet, so nothing may be stored.'
    case 'joists-hold-class': return `The joists can take ${told.psf(reason.allowedPsf)}, which is enough for the ${told.psf(reason.psf)} of this class${where(reason.fieldName)}.`
    case 'joists-hold-less': return `The joists can take only ${told.psf(reason.psf)} of the ${told.psf(reason.classPsf)} the code asks; ${LIMIT_WORDS[reason.governedBy]} decides${where(reason.fieldName)}.`
    case 'joists-not-covered': return `These joists lie outside what the tables cover, so ${told.psf(reason.psf)} is taken until an engineer says more.`
    case 'bearing-walls-unsure': return `Nobody is sure that both ends of the joists lie on bearing walls, so the span may be longer than it looks: ${told.psf(reason.psf)} is taken (${reason.fieldNames.join(', ')}).`
    case 'joists-not-measured': return `The joists have not been measured, so ${told.psf(reason.psf)} is taken instead of ${told.psf(reason.classPsf)}. Measure the joists.`
    default: return isHold(reason) ? holdSentence(reason, told) : classSentence(reason, told)
  }
}

const MEASURE_WORDS: Record<JoistMeasure, string> = { size: 'size', spacingIn: 'spacing', spanFt: 'clear span' }
const COVERED_WORDS = { breadthIn: 'thickness', depthIn: 'depth', spanFt: 'span', slenderness: 'slenderness' } as const

/** Why the joists of a group were not worked out. */
export function joistAnswerSentence(answer: Exclude<JoistCapacityAnswer, JoistCapacity>): string {
  switch (answer.kind) {
    case 'not-joists': return 'Trusses, and framing nobody knows, are never calculated.'
    case 'measures-missing': return `${answer.fieldName}: not worked out without ${answer.missing.map(measure => MEASURE_WORDS[measure]).join(', ')}. Measure the joists.`
    case 'not-covered': return `${answer.fieldName}: the tables do not cover these joists (${COVERED_WORDS[answer.measure]} ${figure(answer.value)}, limit ${figure(answer.limit)}). An engineer decides.`
  }
}

export const LIMIT_WORDS = { bending: 'bending', deflection: 'sag', shear: 'shear', bearing: 'bearing on the wall' } as const

const isHold = (reason: HoldReason | ClassReason): reason is HoldReason =>
  reason.code === 'condition' || reason.code === 'earlier-hold' || reason.code.startsWith('notch') || reason.code.startsWith('hole')

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)
