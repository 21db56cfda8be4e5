import type { AtticSurvey } from '../../types/attic'
import type { CapacityLimit, JoistCapacity } from '../../types/atticRating'
import { CEILING_PSF, DECK_PSF, INSULATION_DEPTH_ASSUMED_IN, INSULATION_PSF_PER_IN, LUMBER_LB_PER_FT3 } from '../structure/deadLoadValues'
import { DEFLECTION_DIVISOR_FLEXIBLE, DEFLECTION_DIVISOR_PLASTER, KCR_DRY, KCR_GREEN_OR_DAMP } from '../structure/ndsFactors'
import { formatNumber } from '../units'
import { LIMIT_WORDS } from './ratingReasons'

/** One line of the sums: what, how, with which numbers, what comes out, and from where the rule or number is. */
export interface SumLine { what: string, formula: string, numbers: string, result: string, source: string }

const n = (value: number, decimals = 2) => formatNumber(value, decimals)
const NDS = 'NDS 2018'
const SURVEY = 'from the survey'

/** What goes into the calculation of one group, each with where it came from. */
export function inputLines(capacity: JoistCapacity): SumLine[] {
  const { inputs, assumptions } = capacity
  const took = (code: JoistCapacity['assumptions'][number]['code']) => assumptions.some(assumption => assumption.code === code)
  const line = (what: string, result: string, source: string): SumLine => ({ what, formula: '', numbers: '', result, source })
  return [
    line('Wood and grade', `${inputs.species} ${inputs.grade}`, took('no-stamp-weakest-grade') ? 'no stamp known: the weakest common wood (ours)' : 'grade stamp, from the survey'),
    line('Thickness b × depth d', `${n(inputs.breadthIn)} × ${n(inputs.depthIn)} in`, took('size-between-table-sizes') ? 'as measured' : 'NDS 2018 Supplement Table 1B, dry dressed'),
    line('Spacing s', `${n(inputs.spacingIn)} in`, SURVEY),
    line('Clear span L', `${n(inputs.spanFt * 12)} in`, took('bearing-walls-not-asked') ? 'from the survey; bearing walls not asked' : SURVEY),
    line('Wood on the wall ℓb', `${n(inputs.bearingLengthIn)} in`, took('bearing-length-assumed') ? 'not measured: IRC R502.6' : SURVEY),
  ]
}

/** The wood's reference values and the factors on them, up to Fb′ and Fv′. */
export function stressLines({ inputs, factors, working }: JoistCapacity): SumLine[] {
  const { lumber, section } = working
  const value = (what: string, psi: number): SumLine => ({ what, formula: '', numbers: '', result: `${n(psi, 0)} psi`, source: lumber.source })
  return [
    { what: 'Section modulus S', formula: 'b·d²/6', numbers: `${n(inputs.breadthIn)}·${n(inputs.depthIn)}²/6`, result: `${n(section.sectionModulusIn3)} in³`, source: 'rectangle' },
    { what: 'Moment of inertia I', formula: 'b·d³/12', numbers: `${n(inputs.breadthIn)}·${n(inputs.depthIn)}³/12`, result: `${n(section.inertiaIn4)} in⁴`, source: 'rectangle' },
    value('Bending Fb', lumber.fbPsi), value('Shear Fv', lumber.fvPsi), value('Crushing Fc⊥', lumber.fcPerpPsi), value('Stiffness E', lumber.ePsi), value('Stability Emin', lumber.eminPsi),
    { what: 'Size CF', formula: '', numbers: '', result: n(factors.cf), source: 'NDS 2018 Supplement Tables 4A and 4B' },
    { what: 'Helping neighbours Cr', formula: '', numbers: '', result: n(factors.cr), source: `${NDS} 4.3.9: three joists, 24 in or less, a fastened ceiling or deck` },
    { what: 'Time CD', formula: '', numbers: '', result: n(factors.cd), source: `${NDS} Table 2.3.2: ${factors.cd < 1 ? 'over ten years' : 'ten years'}` },
    { what: 'Tipping CL', formula: '', numbers: '', result: n(factors.cl, 3), source: `${NDS} 3.3.3 and 4.4.1` },
    { what: 'Moisture CM, heat Ct', formula: '', numbers: '', result: `${n(factors.cm)}, ${n(factors.ct)}`, source: `${NDS} 4.3.3, 4.3.4: dry wood, ordinary heat` },
    { what: 'Bending allowed Fb′', formula: 'Fb·CF·Cr·CD·CL·CM·Ct', numbers: [lumber.fbPsi, factors.cf, factors.cr, factors.cd, factors.cl, factors.cm, factors.ct].map(value => n(value, 3)).join('·'), result: `${n(working.fbPrimePsi, 0)} psi`, source: `${NDS} Table 4.3.1` },
    { what: 'Shear allowed Fv′', formula: 'Fv·CD', numbers: `${n(lumber.fvPsi, 0)}·${n(factors.cd)}`, result: `${n(working.fvPrimePsi, 0)} psi`, source: `${NDS} Table 4.3.1` },
  ]
}

/** What hangs on the joists already, line by line. */
export function deadLines({ inputs, working: { dead }, assumptions }: JoistCapacity, survey: Pick<AtticSurvey, 'ceilingFinish' | 'insulation' | 'deck'>): SumLine[] {
  const insulation = INSULATION_PSF_PER_IN[survey.insulation.material]
  const depthIn = survey.insulation.depthIn ?? INSULATION_DEPTH_ASSUMED_IN
  const floor = assumptions.find(assumption => assumption.code === 'dead-load-floor')
  const sum = dead.ceilingPsf + dead.insulationPsf + dead.deckPsf + dead.joistsPsf
  return [
    { what: 'Ceiling below', formula: '', numbers: '', result: `${n(dead.ceilingPsf)} psf`, source: CEILING_PSF[survey.ceilingFinish].source },
    { what: 'Insulation', formula: 'weight per inch · depth', numbers: dead.insulationPsf === 0 ? '' : `${n(insulation.psf, 3)}·${n(depthIn)}`, result: `${n(dead.insulationPsf)} psf`, source: survey.insulation.depthIn === null && dead.insulationPsf > 0 ? `${insulation.source}; depth not measured, ours` : insulation.source },
    { what: 'Boards to walk on', formula: '', numbers: '', result: `${n(dead.deckPsf)} psf`, source: dead.deckPsf === 0 ? 'no boards' : `${n(DECK_PSF)} psf: ASCE 7 Table C3.1-1, from memory` },
    { what: 'Joists themselves', formula: '33·b·d/(12·s)', numbers: `${LUMBER_LB_PER_FT3}·${n(inputs.breadthIn)}·${n(inputs.depthIn)}/(12·${n(inputs.spacingIn)})`, result: `${n(dead.joistsPsf)} psf`, source: `wood of ${LUMBER_LB_PER_FT3} lb/ft³, from published joist weights` },
    { what: 'Dead load taken D', formula: 'sum', numbers: n(sum), result: `${n(inputs.deadPsf)} psf`, source: floor ? 'not all known: at least the allowance of IRC R802.5.1' : 'built up' },
  ]
}

export interface LimitLine extends SumLine { limit: CapacityLimit, psf: number, governs: boolean }

/** The four limits as stored load over the whole group. */
export function limitLines(capacity: JoistCapacity): LimitLine[] {
  const { inputs, working, governedBy } = capacity
  const { lumber, section } = working
  const s = n(inputs.spacingIn)
  const spanIn = inputs.spanFt * 12
  const L = n(spanIn)
  const D = n(inputs.deadPsf)
  const rows: Record<CapacityLimit, Omit<SumLine, 'what' | 'result'> & { psf: number }> = {
    bending: { psf: capacity.bendingPsf, formula: '8·Fb′·S·144/(L²·s) − D', numbers: `8·${n(working.fbPrimePsi, 1)}·${n(section.sectionModulusIn3, 3)}·144/(${L}²·${s}) − ${D}`, source: `${NDS} 3.3, simple span` },
    deflection: { psf: capacity.deflectionPsf, formula: '384·E·I·144/(5·n·L³·s)', numbers: `384·${n(lumber.ePsi, 0)}·${n(section.inertiaIn4, 3)}·144/(5·${inputs.deflectionDivisor}·${L}³·${s})`, source: `IRC R301.7: L/${inputs.deflectionDivisor}, stored load only` },
    shear: { psf: capacity.shearPsf, formula: '(2/3)·Fv′·b·d·144/((L/2 − d)·s) − D', numbers: `(2/3)·${n(working.fvPrimePsi, 1)}·${n(section.areaIn2, 3)}·144/(${n(working.shearArmIn)}·${s}) − ${D}`, source: `${NDS} 3.4.2 and 3.4.3.1` },
    bearing: { psf: capacity.bearingPsf, formula: '2·Fc⊥·b·ℓb·144/(L·s) − D', numbers: `2·${n(lumber.fcPerpPsi, 0)}·${n(inputs.breadthIn)}·${n(inputs.bearingLengthIn)}·144/(${L}·${s}) − ${D}`, source: `${NDS} 3.10.2` },
  }
  return (Object.keys(rows) as CapacityLimit[]).map(limit => ({ limit, what: capital(LIMIT_WORDS[limit]), result: `${n(rows[limit].psf, 1)} psf`, governs: limit === governedBy, ...rows[limit] }))
}

/** The sag limit of the other kind of ceiling, to compare. */
export function otherDivisor({ inputs, deflectionPsf }: JoistCapacity): { divisor: number, psf: number } {
  const divisor = inputs.deflectionDivisor === DEFLECTION_DIVISOR_PLASTER ? DEFLECTION_DIVISOR_FLEXIBLE : DEFLECTION_DIVISOR_PLASTER
  return { divisor, psf: deflectionPsf * inputs.deflectionDivisor / divisor }
}

/** Sag in the middle when the whole group stands full at a load, at once and over the years (NDS 2018 3.5.2). */
export function sagAt({ inputs, eiLbIn2 }: JoistCapacity, psf: number, greenOrDamp: boolean): { atOnceIn: number, kcr: number, laterIn: number, limitIn: number } {
  const spanIn = inputs.spanFt * 12
  const atOnceIn = 5 * (psf * inputs.spacingIn / 144) * spanIn ** 4 / (384 * eiLbIn2)
  const kcr = greenOrDamp ? KCR_GREEN_OR_DAMP : KCR_DRY
  return { atOnceIn, kcr, laterIn: kcr * atOnceIn, limitIn: spanIn / inputs.deflectionDivisor }
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)
