import type { AtticDocument, AtticSurvey, JoistField } from '../../types/attic'
import type { OpenAnswer, OpenAnswerCode, OpenAnswers } from '../../types/openAnswer'
import { STORAGE_CLEAR_HEIGHT_IN, STORAGE_OPENING_IN } from '../structure/codeClass'
import { sectionOf } from '../structure/joistCapacity'
import { rateAttic } from '../structure/rating'

type Change = (survey: AtticSurvey) => AtticSurvey
interface Open { code: OpenAnswerCode, fieldName: string | null, path: string, best: Change | null }

/** What is filled in to see the best an open answer could give: never shown as an answer. Ours. */
const BEST_BEARING_IN = 3.5
const BEST_WOOD = { species: 'Douglas fir-larch', grade: 'SS' } as const

const known = (value: number | null) => value !== null && Number.isFinite(value) && value > 0

function openInAttic(survey: AtticSurvey): Open[] {
  const open: Open[] = []
  const ask = (code: OpenAnswerCode, path: string, best: Change | null) => open.push({ code, fieldName: null, path, best })
  if (survey.framing === 'unknown') ask('framing', 'framing', null)
  if (survey.conditions === null) ask('condition', 'conditions', null)
  if (survey.framing !== 'rafters-and-joists') return open
  const byCode = survey.habitable === true || survey.access === 'fixed-stairs'
  if (!byCode && survey.clearHeightIn === null) ask('clear-height', 'clearHeightIn', one => ({ ...one, clearHeightIn: STORAGE_CLEAR_HEIGHT_IN }))
  if (!byCode && survey.access !== 'none' && (survey.openingWidthIn === null || survey.openingLengthIn === null)) {
    ask('opening', 'openingWidthIn', one => ({ ...one, openingWidthIn: STORAGE_OPENING_IN.width, openingLengthIn: STORAGE_OPENING_IN.length }))
  }
  if (survey.ceilingFinish === 'unknown') ask('finish', 'ceilingFinish', one => ({ ...one, ceilingFinish: 'gypsum-half-inch' }))
  if (survey.insulation.material === 'unknown' || (survey.insulation.material !== 'none' && survey.insulation.depthIn === null)) {
    ask('insulation', 'insulation.material', one => ({ ...one, insulation: { material: 'none', depthIn: null } }))
  }
  if (survey.deck === 'unknown') ask('deck', 'deck', one => ({ ...one, deck: 'full' }))
  if (survey.joistFields.length === 0) ask('joists', 'joistFields', null)
  return open
}

function openInField(field: JoistField, index: number): Open[] {
  const open: Open[] = []
  const path = (name: keyof JoistField) => `joistFields.${index}.${name}`
  const set = (change: Partial<JoistField>): Change => survey => ({ ...survey, joistFields: survey.joistFields.map((one, at) => at === index ? { ...one, ...change } : one) })
  const ask = (code: OpenAnswerCode, name: keyof JoistField, best: Change | null) => open.push({ code, fieldName: field.name, path: path(name), best })
  const missing = ([['size', sectionOf(field) !== null], ['spacingIn', known(field.spacingIn)], ['spanFt', known(field.spanFt)], ['joistCount', known(field.joistCount)]] as const).find(([, there]) => !there)
  if (missing) ask('measures', missing[0], null)
  if (!field.bothEndsBear) ask('bearing-walls', 'bothEndsBear', set({ bothEndsBear: true }))
  if (field.species === 'unknown' || field.grade === 'unknown' || field.grade === 'no stamp') ask('stamp', 'species', set({ ...BEST_WOOD, ...field.species !== 'unknown' && { species: field.species } }))
  if (field.topEdgeBraced === null) ask('top-edge', 'topEdgeBraced', set({ topEdgeBraced: true }))
  if (!known(field.bearingLengthIn)) ask('bearing-length', 'bearingLengthIn', set({ bearingLengthIn: BEST_BEARING_IN }))
  return open
}

/**
 * What a survey leaves open, and the rating if each answer, or all of them, came out as well as they can. It tells what is
 * worth measuring; it promises nothing, since an answer may as well come out badly.
 */
export function openAnswers(survey: AtticSurvey, documents: AtticDocument[] = []): OpenAnswers {
  const open = [...openInAttic(survey), ...survey.framing === 'rafters-and-joists' ? survey.joistFields.flatMap(openInField) : []]
  const rated = (one: AtticSurvey) => rateAttic(one, documents).ratedPsf
  const answers: OpenAnswer[] = open.map(({ best, ...answer }) => ({ ...answer, atBestPsf: best ? rated(best(survey)) : null }))
  const foreseen = open.filter(({ code }) => code !== 'condition').every(({ best }) => best !== null)
  return {
    nowPsf: rated(survey), answers,
    allAtBestPsf: foreseen ? rated(open.reduce((one, { best }) => best ? best(one) : one, survey)) : null,
  }
}
