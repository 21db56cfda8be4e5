import type { AtticDocument, AtticSurvey, CodeBasis } from '../../types/attic'
import type { AtticRating, JoistCapacity, JoistCapacityAnswer, RatingCaution, RatingReason } from '../../types/atticRating'
import { IRC_R301_5, codeClass } from './codeClass'
import type { CodeClass } from './codeClass'
import { boardInsulationLimitPsf, insulationPsf } from './deadLoad'
import { joistCapacity, sectionOf } from './joistCapacity'
import { holdReasons } from './notchesAndHoles'
import { documentedRating, holdState } from './ratingDocuments'

/** Most that is taken where nobody has measured the joists; ours, on the safe side: older houses were often framed for less. */
export const UNVERIFIED_PSF = 10

const isCapacity = (answer: JoistCapacityAnswer): answer is JoistCapacity => answer.kind === 'capacity'

function insulationCautions(survey: AtticSurvey): RatingCaution[] {
  const cautions: RatingCaution[] = []
  const { psf } = insulationPsf(survey.insulation)
  for (const field of survey.joistFields) {
    const section = sectionOf(field)
    const { depthIn } = survey.insulation
    if (section && depthIn !== null && depthIn >= section.depthIn) {
      cautions.push({ code: 'insulation-covers-joists', insulationDepthIn: depthIn, joistDepthIn: section.depthIn, fieldName: field.name })
    }
    const limitPsf = field.spacingIn === null ? null : boardInsulationLimitPsf(survey.ceilingFinish, field.spacingIn)
    if (limitPsf !== null && psf > limitPsf) cautions.push({ code: 'insulation-heavy-for-board', insulationPsf: psf, limitPsf, fieldName: field.name })
  }
  return cautions
}

/** Said with every rating. */
function surveyCautions(survey: AtticSurvey, cutsAllowed: boolean): RatingCaution[] {
  const cautions: RatingCaution[] = [{ code: 'estimate-only' }]
  if (survey.conditions === null) cautions.push({ code: 'condition-not-inspected' })
  if (survey.deck !== 'full') cautions.push({ code: 'no-deck', deckAreaFt2: survey.deck === 'partial' ? survey.deckAreaFt2 ?? null : null })
  if (!cutsAllowed) return cautions
  for (const field of survey.joistFields) {
    if (field.notches.length > 0) cautions.push({ code: 'notched-within-limits', fieldName: field.name })
    if (field.holes.length > 0) cautions.push({ code: 'bored-within-limits', fieldName: field.name })
  }
  return cautions
}

type Decision = Pick<AtticRating, 'ratedPsf' | 'basis' | 'reasons' | 'cautions'>

/** The lesser of the class and what the measured joists take; with any field not measured, at most the unverified load. */
function decideByJoists(survey: AtticSurvey, code: CodeClass, answers: JoistCapacityAnswer[]): Decision {
  const { classPsf } = code
  const weakest = answers.filter(isCapacity).reduce<JoistCapacity | null>((least, answer) => least && least.allowedPsf <= answer.allowedPsf ? least : answer, null)
  const cautions = answers.filter(isCapacity).flatMap(answer => answer.assumptions)
  const reasons: RatingReason[] = []
  const joistsLess = weakest !== null && weakest.allowedPsf < classPsf
  if (weakest && joistsLess) reasons.push({ code: 'joists-hold-less', psf: weakest.allowedPsf, classPsf, governedBy: weakest.governedBy, fieldName: weakest.fieldName })
  const unsure = survey.joistFields.filter(field => field.bothEndsBear === null || field.bothEndsBear === false).map(field => field.name)
  const unverified = answers.length === 0 || !answers.every(isCapacity) || unsure.length > 0
  if (!unverified) {
    if (weakest && !joistsLess) reasons.push({ code: 'joists-hold-class', psf: classPsf, allowedPsf: weakest.allowedPsf, fieldName: weakest.fieldName })
    return { ratedPsf: Math.min(classPsf, weakest?.allowedPsf ?? 0), basis: joistsLess ? 'joists' : 'class', reasons, cautions }
  }
  const psf = Math.min(classPsf, UNVERIFIED_PSF, weakest?.allowedPsf ?? UNVERIFIED_PSF)
  const missing = answers.filter(answer => answer.kind === 'measures-missing').map(answer => answer.fieldName)
  const outside = answers.filter(answer => answer.kind === 'not-covered').map(answer => answer.fieldName)
  if (missing.length > 0 || survey.joistFields.length === 0) reasons.push({ code: 'joists-not-measured', psf, classPsf, fieldNames: missing })
  if (unsure.length > 0) reasons.push({ code: 'bearing-walls-unsure', psf, classPsf, fieldNames: unsure })
  if (outside.length > 0) reasons.push({ code: 'joists-not-covered', psf, classPsf, fieldNames: outside })
  return { ratedPsf: psf, basis: 'unverified', reasons, cautions }
}

function rateJoisted(survey: AtticSurvey, basis: CodeBasis): AtticRating {
  const code = codeClass(survey, basis)
  const withStorage = code.atticClass !== 'no-storage'
  const joistCheck = survey.joistFields.map(field => joistCapacity(field, survey, { withStorage, overTenYears: survey.standsOverTenYears === true }))
  const common = { hold: false, classPsf: code.classPsf, atticClass: code.atticClass, joistCheck }
  const general: RatingCaution[] = [{ code: 'local-amendments', basisName: basis.name }, ...insulationCautions(survey)]
  if (withStorage) {
    const decision = decideByJoists(survey, code, joistCheck)
    return { ...common, ...decision, reasons: [...code.reasons, ...decision.reasons], cautions: [...general, ...decision.cautions] }
  }
  const weak = joistCheck.filter(isCapacity).filter(answer => answer.allowedPsf < code.classPsf)
  const belowAccess: RatingCaution[] = weak.map(({ allowedPsf, fieldName }) => ({ code: 'joists-below-access-load', allowedPsf, accessPsf: code.classPsf, fieldName }))
  return { ...common, ratedPsf: 0, basis: 'class', reasons: code.reasons, cautions: [...general, ...belowAccess, ...joistCheck.filter(isCapacity).flatMap(answer => answer.assumptions)] }
}

/** The damage on record as of this survey, lifted by a paper or not: seen in it, or carried over from an earlier one. */
export function damageOnRecord(survey: AtticSurvey): { foundOn: string } | null {
  return holdReasons(survey).length > 0 ? { foundOn: survey.surveyedOn } : survey.earlierHold ?? null
}

/**
 * Load for stored goods, psf, and why: a hold first, then a paper on file, then framing, then the code's class held back
 * by what the joists can take. Trusses and unknown framing are never calculated. Reasons and cautions are codes with numbers.
 */
export function rateAttic(survey: AtticSurvey, documents: AtticDocument[] = [], basis: CodeBasis = survey.codeBasis ?? IRC_R301_5): AtticRating {
  const joisted = survey.framing === 'rafters-and-joists'
  const code = joisted ? codeClass(survey, basis) : null
  const common = { classPsf: code?.classPsf ?? null, atticClass: code?.atticClass ?? null }
  const seen = holdReasons(survey)
  const found = seen.length === 0 && survey.earlierHold ? [{ code: 'earlier-hold' as const, foundOn: survey.earlierHold.foundOn }] : seen
  const hold = holdState(found, documents, damageOnRecord(survey)?.foundOn ?? survey.surveyedOn)
  const cautions = [...surveyCautions(survey, found.length === 0), ...hold.cautions]
  if (hold.held) return { ...common, ratedPsf: 0, basis: 'hold', hold: true, reasons: found, cautions }
  const papers = documentedRating(documents, survey.framing)
  cautions.push(...papers.cautions)
  const rating = unheldRating(survey, basis, common, papers.whole)
  const limited = papers.part && papers.part.ratedPsf < rating.ratedPsf ? papers.part : null
  if (!limited) return { ...rating, cautions: [...cautions, ...rating.cautions] }
  return {
    ...rating, ratedPsf: limited.ratedPsf, basis: 'document', cautions: [...cautions, ...rating.cautions],
    reasons: [{ code: 'documented-part', psf: limited.ratedPsf, area: limited.area }, ...rating.reasons],
  }
}

function unheldRating(survey: AtticSurvey, basis: CodeBasis, common: Pick<AtticRating, 'classPsf' | 'atticClass'>, whole: ReturnType<typeof documentedRating>['whole']): AtticRating {
  if (whole) {
    const { kind, ratedPsf, writtenOn, writtenBy } = whole
    return { ...common, ratedPsf, basis: 'document', hold: false, reasons: [{ code: 'documented', kind, psf: ratedPsf, writtenOn, writtenBy }], cautions: [] }
  }
  if (survey.framing === 'rafters-and-joists') return rateJoisted(survey, basis)
  return { ...common, ratedPsf: 0, basis: 'framing', hold: false, reasons: [{ code: survey.framing === 'trusses' ? 'trusses' : 'framing-unknown' }], cautions: [] }
}
