import type { AtticSurvey, JoistField, Species, StampedGrade } from '../../types/attic'
import type { CapacityLimit, CapacityWorking, JoistAssumption, JoistCapacity, JoistCapacityAnswer, JoistMeasure } from '../../types/atticRating'
import { GREATEST_SLENDERNESS, beamStability, effectiveLengthIn, needsTopEdgeHeld } from './beamStability'
import { LONGEST_SPAN_FT } from './checkLoadPlan'
import type { DeadLoad } from './deadLoad'
import { deadLoad } from './deadLoad'
import type { LumberValues } from './lumber'
import { NO_STAMP, lumberValues, sectionProperties, sizeClassOf } from './lumber'
import { DRESSED_SIZES } from './lumberValues'
import {
  BEARING_LENGTH_IN, CD_PERMANENT, CD_TEN_YEARS, CM_DRY, CT_ORDINARY, DEFLECTION_DIVISOR_FLEXIBLE, DEFLECTION_DIVISOR_PLASTER,
  REPETITIVE, repetitiveFactor,
} from './ndsFactors'

export type CapacitySurvey = Pick<AtticSurvey, 'framing' | 'ceilingFinish' | 'insulation' | 'deck'>

export interface CapacityOptions {
  /** Decides the dead load allowance: 10 psf with storage, 5 without. */
  withStorage: boolean
  /** Goods will stand for more than ten years: CD 0.9 instead of 1.0. */
  overTenYears?: boolean
}

/** Dimension lumber of NDS Supplement Tables 4A and 4B; thicker is timber with lower values, and deeper is rare: not covered. */
export const COVERED = { leastBreadthIn: 0.75, greatestBreadthIn: 4.5, leastDepthIn: 2, greatestDepthIn: 16 } as const

const known = (value: number | null): value is number => value !== null && Number.isFinite(value) && value > 0

/** Breadth and depth as measured, else the dressed size; null when neither is known. */
export function sectionOf(member: Pick<JoistField, 'size' | 'breadthIn' | 'depthIn'>): { breadthIn: number, depthIn: number, measured: boolean } | null {
  if (known(member.breadthIn) && known(member.depthIn)) return { breadthIn: member.breadthIn, depthIn: member.depthIn, measured: true }
  if (member.breadthIn !== null || member.depthIn !== null || member.size === null) return null
  return { breadthIn: DRESSED_SIZES[member.size].breadthIn, depthIn: DRESSED_SIZES[member.size].depthIn, measured: false }
}

/** Species and grade to calculate with: as stamped, else the weakest common pair. */
export function stampedOrWeakest(field: Pick<JoistField, 'species' | 'grade'>): { species: Species, grade: StampedGrade, stamped: boolean } {
  if (field.species === 'unknown' || field.grade === 'unknown' || field.grade === 'no stamp') return { ...NO_STAMP, stamped: false }
  return { species: field.species, grade: field.grade, stamped: true }
}

/** IRC Table R301.7: flexible finishes L/240, plaster L/360; a finish nobody named is taken as plaster. */
export function deflectionDivisor(finish: AtticSurvey['ceilingFinish']): { divisor: number, assumed: boolean } {
  if (finish === 'plaster-on-lath') return { divisor: DEFLECTION_DIVISOR_PLASTER, assumed: false }
  if (finish === 'other' || finish === 'unknown') return { divisor: DEFLECTION_DIVISOR_PLASTER, assumed: true }
  return { divisor: DEFLECTION_DIVISOR_FLEXIBLE, assumed: false }
}

interface KnownJoist {
  field: JoistField
  breadthIn: number
  depthIn: number
  measured: boolean
  spacingIn: number
  spanIn: number
}

function knownJoist(field: JoistField): KnownJoist | Exclude<JoistCapacityAnswer, JoistCapacity> {
  const section = sectionOf(field)
  const missing: JoistMeasure[] = []
  if (!section) missing.push('size')
  if (!known(field.spacingIn)) missing.push('spacingIn')
  if (!known(field.spanFt)) missing.push('spanFt')
  if (!section || !known(field.spacingIn) || !known(field.spanFt)) return { kind: 'measures-missing', fieldName: field.name, missing }
  const outside = (measure: 'breadthIn' | 'depthIn' | 'spanFt', value: number, limit: number): JoistCapacityAnswer & { kind: 'not-covered' } =>
    ({ kind: 'not-covered', fieldName: field.name, measure, value, limit })
  if (section.breadthIn > COVERED.greatestBreadthIn) return outside('breadthIn', section.breadthIn, COVERED.greatestBreadthIn)
  if (section.breadthIn < COVERED.leastBreadthIn) return outside('breadthIn', section.breadthIn, COVERED.leastBreadthIn)
  if (section.depthIn > COVERED.greatestDepthIn) return outside('depthIn', section.depthIn, COVERED.greatestDepthIn)
  if (section.depthIn < COVERED.leastDepthIn) return outside('depthIn', section.depthIn, COVERED.leastDepthIn)
  if (field.spanFt > LONGEST_SPAN_FT) return outside('spanFt', field.spanFt, LONGEST_SPAN_FT)
  return { field, ...section, spacingIn: field.spacingIn, spanIn: field.spanFt * 12 }
}

/** CL for this joist, and its slenderness; 1 where the top edge is held or the section needs no holding. */
function stability(joist: KnownJoist, deck: AtticSurvey['deck'], eminPsi: number, fbStarPsi: number): { cl: number, slenderness: number, computed: boolean } {
  const held = joist.field.topEdgeBraced ?? deck === 'full'
  if (held || !needsTopEdgeHeld(joist.breadthIn, joist.depthIn)) return { cl: 1, slenderness: 0, computed: false }
  const { cl, slenderness } = beamStability({
    breadthIn: joist.breadthIn, depthIn: joist.depthIn, eminPsi, fbStarPsi,
    effectiveLengthIn: effectiveLengthIn(joist.spanIn, joist.depthIn, 'uniform'),
  })
  return { cl, slenderness, computed: true }
}

function lumberAssumptions(joist: KnownJoist, lumber: LumberValues, wood: ReturnType<typeof stampedOrWeakest>, older: boolean): JoistAssumption[] {
  const { field } = joist
  const assumptions: JoistAssumption[] = []
  if (!wood.stamped) assumptions.push({ code: 'no-stamp-weakest-grade', species: wood.species, grade: wood.grade, fieldName: field.name })
  if (joist.measured) assumptions.push({ code: 'size-between-table-sizes', depthIn: joist.depthIn, takenAs: lumber.sizeClass, fieldName: field.name })
  if (wood.species === 'Southern pine' && field.installedBeforeJune2013 !== false && !older) {
    assumptions.push({ code: 'southern-pine-lower-values', fieldName: field.name })
  }
  return assumptions
}

/** A ceiling or deck fastened to every joist lets neighbours help each other in bending (NDS 4.3.9). */
function tiesJoists(survey: CapacitySurvey): boolean {
  return survey.deck === 'full' || !['other', 'unknown'].includes(survey.ceilingFinish)
}

function workingOf(joist: KnownJoist, lumber: LumberValues, dead: DeadLoad, fbPrimePsi: number, cd: number): CapacityWorking {
  const { fbPsi, fvPsi, fcPerpPsi, ePsi, eminPsi, source } = lumber
  const { ceilingPsf, insulationPsf, deckPsf, joistsPsf } = dead
  return {
    lumber: { fbPsi, fvPsi, fcPerpPsi, ePsi, eminPsi, source }, section: sectionProperties(joist.breadthIn, joist.depthIn), fbPrimePsi, fvPrimePsi: fvPsi * cd,
    // NDS 3.4.3.1: uniform load within one depth of the support is left out; never less than a quarter span here, for stubby joists.
    shearArmIn: Math.max(joist.spanIn / 2 - joist.depthIn, joist.spanIn / 4),
    dead: { ceilingPsf, insulationPsf, deckPsf, joistsPsf },
  }
}

/** Live load by each limit, psf over the whole field, less the dead load where it counts; never below 0. */
function limitsPsf(joist: KnownJoist, working: CapacityWorking, bearingLengthIn: number, deadPsf: number, divisor: number): Record<CapacityLimit, number> {
  const { breadthIn, spacingIn, spanIn } = joist
  const { lumber, section: { sectionModulusIn3, inertiaIn4, areaIn2 }, fbPrimePsi, fvPrimePsi, shearArmIn } = working
  const psfPerLbIn = 144 / spacingIn
  const live = (totalPsf: number): number => Math.max(0, totalPsf - deadPsf)
  return {
    bending: live(8 * fbPrimePsi * sectionModulusIn3 / spanIn ** 2 * psfPerLbIn),
    deflection: 384 * lumber.ePsi * inertiaIn4 / (5 * divisor * spanIn ** 3) * psfPerLbIn,
    shear: live(2 / 3 * fvPrimePsi * areaIn2 / shearArmIn * psfPerLbIn),
    bearing: live(2 * lumber.fcPerpPsi * breadthIn * bearingLengthIn / spanIn * psfPerLbIn),
  }
}

function leastLimit(limits: Record<CapacityLimit, number>): CapacityLimit {
  const names: CapacityLimit[] = ['bending', 'deflection', 'shear', 'bearing']
  return names.reduce((least, name) => limits[name] < limits[least] ? name : least)
}

/**
 * Stored live load, psf over the whole field, that the joists can take by NDS 2018 allowable stress design, with the
 * limit that governs. No answer when size, spacing or span is missing, or the joist is outside dimension lumber.
 */
export function joistCapacity(field: JoistField, survey: CapacitySurvey, options: CapacityOptions): JoistCapacityAnswer {
  if (survey.framing !== 'rafters-and-joists') return { kind: 'not-joists', fieldName: field.name, framing: survey.framing }
  const joist = knownJoist(field)
  if ('kind' in joist) return joist
  const { breadthIn, depthIn, spacingIn } = joist
  const wood = stampedOrWeakest(field)
  const older = field.installedBeforeJune2013 === true && field.preJune2013StampProven
  const lumber = lumberValues(wood.species, wood.grade, joist.measured ? sizeClassOf(depthIn) : field.size ?? sizeClassOf(depthIn), older)
  const dead = deadLoad(survey, { fieldName: field.name, breadthIn, depthIn, spacingIn }, options.withStorage)
  const assumptions = lumberAssumptions(joist, lumber, wood, older)
  const finish = deflectionDivisor(survey.ceilingFinish)
  if (finish.assumed) assumptions.push({ code: 'finish-taken-as-plaster', fieldName: field.name })
  if (field.bothEndsBear === undefined) assumptions.push({ code: 'bearing-walls-not-asked', fieldName: field.name })
  if (options.overTenYears) assumptions.push({ code: 'stands-over-ten-years', cd: CD_PERMANENT, fieldName: field.name })
  const bearingLengthIn = known(field.bearingLengthIn) ? field.bearingLengthIn : BEARING_LENGTH_IN
  if (!known(field.bearingLengthIn)) assumptions.push({ code: 'bearing-length-assumed', bearingLengthIn, fieldName: field.name })
  const cr = repetitiveFactor(field.joistCount, spacingIn, tiesJoists(survey))
  if (field.joistCount === null || field.joistCount < REPETITIVE.leastMembers) {
    assumptions.push({ code: 'few-joists-no-sharing', joistCount: field.joistCount, fieldName: field.name })
  }
  const cd = options.overTenYears ? CD_PERMANENT : CD_TEN_YEARS
  const fbStarPsi = lumber.fbPsi * lumber.cf * cr * cd * CM_DRY * CT_ORDINARY
  const { cl, slenderness, computed } = stability(joist, survey.deck, lumber.eminPsi, fbStarPsi)
  if (slenderness > GREATEST_SLENDERNESS) return { kind: 'not-covered', fieldName: field.name, measure: 'slenderness', value: slenderness, limit: GREATEST_SLENDERNESS }
  if (computed) assumptions.push({ code: 'top-edge-unbraced', cl, fieldName: field.name })
  const working = workingOf(joist, lumber, dead, fbStarPsi * cl, cd)
  const limits = limitsPsf(joist, working, bearingLengthIn, dead.psf, finish.divisor)
  const governedBy = leastLimit(limits)
  return {
    kind: 'capacity', fieldName: field.name, allowedPsf: limits[governedBy], governedBy,
    bendingPsf: limits.bending, deflectionPsf: limits.deflection, shearPsf: limits.shear, bearingPsf: limits.bearing,
    inputs: {
      species: wood.species, grade: wood.grade, gradeAsEntered: field.grade, breadthIn, depthIn, spacingIn, spanFt: joist.spanIn / 12, bearingLengthIn,
      deflectionDivisor: finish.divisor, deadPsf: dead.psf, insulationMaterial: survey.insulation.material,
    },
    factors: { cf: lumber.cf, cr, cd, cl, cm: CM_DRY, ct: CT_ORDINARY },
    eiLbIn2: lumber.ePsi * working.section.inertiaIn4,
    working,
    assumptions: [...assumptions, ...dead.assumptions],
  }
}
