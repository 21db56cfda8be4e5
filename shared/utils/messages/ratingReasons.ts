import type { ClassReason, HoldReason, JoistCapacity, JoistCapacityAnswer, JoistMeasure, RatingReason } from '../../types/atticRating'
import type { Condition, DocumentKind } from '../../types/attic'
import { formatDay } from '../days'

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
const psf = (value: number) => `${figure(value)} psf`
const inches = (value: number) => `${figure(value, 2)} in`
const where = (fieldName: string | null) => fieldName ? ` (${fieldName})` : ''

function holdSentence(reason: HoldReason): string {
  switch (reason.code) {
    case 'condition': return `A member is ${CONDITION_WORDS[reason.condition]}.`
    case 'earlier-hold': return `Damage was seen on ${formatDay(reason.foundOn)}. A new survey does not end the hold: an inspection record or an engineer’s letter does.`
    case 'notch-too-deep': return `A notch is ${inches(reason.depthIn)} deep; at most ${inches(reason.limitIn)} is allowed${where(reason.fieldName)}.`
    case 'notch-too-long': return `A notch is ${inches(reason.lengthIn)} long; at most ${inches(reason.limitIn)} is allowed${where(reason.fieldName)}.`
    case 'notch-in-middle-third': return `A joist is notched in the middle third of its span${where(reason.fieldName)}.`
    case 'notch-in-bottom-of-thick-joist': return `A joist ${inches(reason.breadthIn)} thick is notched in its bottom edge${where(reason.fieldName)}.`
    case 'notch-not-measured': return `Notches are there and have not been measured${where(reason.fieldName)}.`
    case 'hole-too-large': return `A hole is ${inches(reason.diameterIn)} wide; at most ${inches(reason.limitIn)} is allowed${where(reason.fieldName)}.`
    case 'hole-near-edge': return `A hole is ${inches(reason.distanceIn)} from the edge; at least ${inches(reason.limitIn)} is needed${where(reason.fieldName)}.`
    case 'hole-near-another': return `A hole is ${inches(reason.distanceIn)} from another; at least ${inches(reason.limitIn)} is needed${where(reason.fieldName)}.`
    case 'hole-not-measured': return `Holes are there and have not been measured${where(reason.fieldName)}.`
  }
}

function classSentence(reason: ClassReason): string {
  switch (reason.code) {
    case 'habitable': return `It is a habitable attic: the code asks ${psf(reason.psf)}.`
    case 'fixed-stairs': return `Fixed stairs lead up: the code asks ${psf(reason.psf)}.`
    case 'limited-storage': return `There is height and an opening for limited storage: the code asks ${psf(reason.psf)}.`
    case 'clear-height-too-low': return `The clear height is ${inches(reason.clearHeightIn)}, less than ${inches(reason.limitIn)}: the code counts no storage here.`
    case 'clear-height-unknown': return `The clear height is not known. From ${inches(reason.limitIn)} on it may count as storage.`
    case 'opening-too-small': return `The opening is ${inches(reason.widthIn)} by ${inches(reason.lengthIn)}, smaller than ${reason.limitWidthIn} by ${reason.limitLengthIn} in: the code counts no storage here.`
    case 'opening-unknown': return `The opening has not been measured. From ${reason.limitWidthIn} by ${reason.limitLengthIn} in on it may count as storage.`
    case 'no-access': return 'There is no way in: the code counts no storage here.'
  }
}

/** One sentence for one reason. */
export function ratingReasonSentence(reason: RatingReason): string {
  switch (reason.code) {
    case 'documented': return `${capital(DOCUMENT_WORDS[reason.kind])} by ${reason.writtenBy} states ${psf(reason.psf)}.`
    case 'documented-part': return `A paper on file allows ${psf(reason.psf)} for one part: ${reason.area}.`
    case 'trusses': return 'The roof is trussed. No storage unless the truss design drawings or an engineer give a figure, which can then be entered with the document attached.'
    case 'framing-unknown': return 'Nobody has told trusses from rafters here yet, so nothing may be stored.'
    case 'joists-hold-class': return `The joists can take ${psf(reason.allowedPsf)}, which is enough for the ${psf(reason.psf)} of this class${where(reason.fieldName)}.`
    case 'joists-hold-less': return `The joists can take only ${psf(reason.psf)} of the ${psf(reason.classPsf)} the code asks; ${LIMIT_WORDS[reason.governedBy]} decides${where(reason.fieldName)}.`
    case 'joists-not-covered': return `These joists lie outside what the tables cover, so ${psf(reason.psf)} is taken until an engineer says more.`
    case 'bearing-walls-unsure': return `Nobody is sure that both ends of the joists lie on bearing walls, so the span may be longer than it looks: ${psf(reason.psf)} is taken (${reason.fieldNames.join(', ')}).`
    case 'joists-not-measured': return `The joists have not been measured, so ${psf(reason.psf)} is taken instead of ${psf(reason.classPsf)}. Measure the joists.`
    default: return isHold(reason) ? holdSentence(reason) : classSentence(reason)
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
