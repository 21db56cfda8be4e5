import type { JoistAssumption, RatingBasis, RatingCaution } from '../../types/atticRating'
import { formatArea, type UnitSystem } from '../units'
import { DOCUMENT_WORDS, RATING_QUANTITIES } from './ratingReasons'

const figure = (value: number, digits = 1) => Number(value.toFixed(digits)).toString()

const PART_WORDS = { ceiling: 'the ceiling', insulation: 'the insulation', deck: 'the deck' } as const

/** What was taken because it was not entered. */
function assumptionSentence(caution: JoistAssumption): string {
  switch (caution.code) {
    case 'no-stamp-weakest-grade': return `No grade stamp was entered, so ${caution.species} ${caution.grade} is taken (${caution.fieldName}).`
    case 'bearing-walls-not-asked': return `The span is taken as measured between bearing walls; nobody has said so yet (${caution.fieldName}).`
    case 'stands-over-ten-years': return `Things will stand for more than ten years: wood under lasting load is taken at ${figure(caution.cd * 100, 0)} % in bending and shear (${caution.fieldName}).`
    case 'bearing-length-assumed': return `${caution.bearingLengthIn} in of bearing on the wall is taken (${caution.fieldName}).`
    case 'top-edge-unbraced': return `Nothing holds the top edge of these joists, which lowers what they take to ${figure(caution.cl * 100, 0)} % (${caution.fieldName}).`
    case 'southern-pine-lower-values': return `Southern pine is taken with the lower values in force since June 2013 (${caution.fieldName}).`
    case 'finish-taken-as-plaster': return `The ceiling finish is not known, so it is taken as plaster, which may sag less (${caution.fieldName}).`
    case 'dead-load-floor': return `The ceiling's own weight is taken as ${figure(caution.takenPsf)} psf, not less (${caution.fieldName}).`
    case 'dead-load-part-assumed': return `${figure(caution.psf)} psf is taken for ${PART_WORDS[caution.part]}, which was not entered (${caution.fieldName}).`
    case 'few-joists-no-sharing': return `Fewer than three joists share, so no help from neighbours is counted (${caution.fieldName}).`
    case 'size-between-table-sizes': return `A depth of ${figure(caution.depthIn, 2)} in lies between table sizes; ${caution.takenAs} is taken for its size factor (${caution.fieldName}).`
  }
}

/** One sentence for one caution. */
export function ratingCautionSentence(caution: RatingCaution, system: UnitSystem = 'us'): string {
  const { psf } = RATING_QUANTITIES[system]
  switch (caution.code) {
    case 'estimate-only': return 'This is an estimate from what was entered. It is not an engineering assessment. Local building codes and a licensed structural engineer decide.'
    case 'local-amendments': return `Loads follow ${caution.basisName}. Your town may have changed them; local code decides.`
    case 'condition-not-inspected': return 'Nobody has looked at the condition of the wood yet.'
    case 'hold-lifted': return `A hold was lifted by ${DOCUMENT_WORDS[caution.kind]} of ${caution.writtenBy}.`
    case 'document-not-attached': return `${DOCUMENT_WORDS[caution.kind]} is named but not attached, so it does not count.`
    case 'document-covers-part': return `A paper on file covers only part of this attic: ${caution.area}.`
    case 'document-not-for-framing': return `A paper on file (${DOCUMENT_WORDS[caution.kind]}) does not speak about this kind of framing, so it does not count.`
    case 'document-before-survey': return 'A paper on file is older than the last survey, so it cannot lift what was seen since.'
    case 'joists-below-access-load': return `The joists take only ${psf(caution.allowedPsf)}, less than the ${psf(caution.accessPsf)} for a person up there. Do not step into this attic (${caution.fieldName}).`
    case 'insulation-covers-joists': return 'Insulation covers the joists: you cannot see where to step, and nothing stands safely on it.'
    case 'insulation-heavy-for-board': return `The insulation weighs ${psf(caution.insulationPsf)}, more than the ${psf(caution.limitPsf)} makers advise for this ceiling board. Nothing may rest on board between joists.`
    case 'no-deck': return (caution.deckAreaFt2 === null ? '' : `Boards lie on ${system === 'us' ? `${figure(caution.deckAreaFt2, 0)} ft²` : formatArea(caution.deckAreaFt2, system)} only. `) + 'There is no full deck. Step on joists only, and rest nothing on the ceiling between them.'
    case 'notched-within-limits': return `Notches are within the limits of the code (${caution.fieldName}).`
    case 'bored-within-limits': return `Holes are within the limits of the code (${caution.fieldName}).`
    default: return assumptionSentence(caution)
  }
}

/** Where the figure comes from, in a few words. */
export const BASIS_WORDS: Record<RatingBasis, string> = {
  hold: 'suspended until inspected',
  document: 'from a paper on file',
  framing: 'from the kind of framing',
  class: 'from the class of attic in the code',
  joists: 'from what the joists take',
  unverified: 'unverified, joists not fully known',
}
