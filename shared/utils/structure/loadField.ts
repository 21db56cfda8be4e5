import type { AtticSurvey, JoistField, Strongback } from '../../types/attic'
import type { JoistMember, LoadField, LoadFieldAnswer } from '../../types/loadPlan'
import { deadLoad } from './deadLoad'
import { sectionOf, stampedOrWeakest } from './joistCapacity'
import { NO_STAMP, lumberValues, sectionProperties, sizeClassOf } from './lumber'
import type { LumberValues } from './lumber'
import { DRESSED_SIZES } from './lumberValues'
import { DEAD_PSF_WITH_STORAGE } from './deadLoadValues'
import { BEARING_LENGTH_IN, CD_PERMANENT, CD_TEN_YEARS } from './ndsFactors'

type Section = { breadthIn: number, depthIn: number }

/** Joist taken where nobody has measured one: the smallest size of the weakest common grade; ours, on the safe side. */
const WEAKEST_SECTION: Section = DRESSED_SIZES['2x4']

const known = (value: number | null): value is number => value !== null && Number.isFinite(value) && value > 0

/** Shear by NDS 3.4.2 for a rectangle, bearing by NDS 3.10.2 at the end of a member (no bearing area factor). */
function memberOf(section: Section, lumber: LumberValues, bearingLengthIn: number, deadPsf: number, cd = CD_TEN_YEARS): JoistMember {
  const { areaIn2 } = sectionProperties(section.breadthIn, section.depthIn)
  return {
    depthIn: section.depthIn,
    shearLb: 2 / 3 * lumber.fvPsi * cd * areaIn2,
    bearingLb: lumber.fcPerpPsi * section.breadthIn * bearingLengthIn,
    deadPsf,
  }
}

const weakestLumber = (depthIn: number): LumberValues => lumberValues(NO_STAMP.species, NO_STAMP.grade, sizeClassOf(depthIn))

/** The weakest joist a verdict on shear and bearing may assume. */
export function weakestMember(): JoistMember {
  return memberOf(WEAKEST_SECTION, weakestLumber(WEAKEST_SECTION.depthIn), BEARING_LENGTH_IN, DEAD_PSF_WITH_STORAGE)
}

function strongbackEiLbIn2(strongback: Strongback): number {
  const section = sectionOf(strongback)
  return section ? weakestLumber(section.depthIn).ePsi * sectionProperties(section.breadthIn, section.depthIn).inertiaIn4 : 0
}

/** Sound strongbacks that an engineer accepts, alone; where there is none, all that are not known to be unsound, for show. */
function strongbacksOf(field: JoistField, spanFt: number, letterAccepts: boolean): { strongbacks: LoadField['strongbacks'], strongbacksCount: boolean } {
  const inside = field.strongbacks.filter(({ atFt, sound }) => sound !== false && atFt > 0 && atFt < spanFt)
  const accepted = inside.filter(({ sound, engineerAccepts }) => sound === true && (engineerAccepts || letterAccepts))
  const strongbacks = (accepted.length > 0 ? accepted : inside)
    .map(strongback => ({ atFt: strongback.atFt, eiLbIn2: strongbackEiLbIn2(strongback) })).filter(({ eiLbIn2 }) => eiLbIn2 > 0)
  return { strongbacks, strongbacksCount: accepted.length > 0 && strongbacks.length > 0 }
}

/**
 * A surveyed field made ready for a load plan at a rating. Span, spacing and count must be known; an unknown size is taken
 * as the weakest joist. `letterAccepts`: an engineer's letter lets strongbacks share (strongbackOpinion). Trusses and unknown framing get none, whatever is known of them.
 */
export function loadFieldOf(survey: Pick<AtticSurvey, 'framing' | 'ceilingFinish' | 'insulation' | 'deck' | 'standsOverTenYears'>, field: JoistField, ratedPsf: number, letterAccepts = false): LoadFieldAnswer {
  if (survey.framing !== 'rafters-and-joists') return { kind: 'not-joists', fieldName: field.name, framing: survey.framing }
  const { spanFt, spacingIn } = field
  const joistCount = field.joistCount !== null && Number.isInteger(field.joistCount) && field.joistCount >= 2 ? field.joistCount : null
  if (!known(spanFt) || !known(spacingIn) || joistCount === null) {
    const sound = { spanFt: known(spanFt), spacingIn: known(spacingIn), joistCount: joistCount !== null }
    return { kind: 'measures-missing', fieldName: field.name, missing: (['spanFt', 'spacingIn', 'joistCount'] as const).filter(measure => !sound[measure]) }
  }
  const measured = sectionOf(field)
  const section = measured ?? WEAKEST_SECTION
  const wood = measured ? stampedOrWeakest(field) : NO_STAMP
  const older = field.installedBeforeJune2013 === true && field.preJune2013StampProven
  const lumber = lumberValues(wood.species, wood.grade, sizeClassOf(section.depthIn), older)
  const dead = deadLoad(survey, { fieldName: field.name, ...section, spacingIn }, true)
  const { strongbacks, strongbacksCount } = strongbacksOf(field, spanFt, letterAccepts)
  return {
    kind: 'field', fieldName: field.name, strongbacksCount, memberAssumed: measured === null,
    field: { spanFt, spacingIn, joistCount, ratedPsf, joistEiLbIn2: lumber.ePsi * sectionProperties(section.breadthIn, section.depthIn).inertiaIn4, strongbacks },
    member: memberOf(section, lumber, known(field.bearingLengthIn) ? field.bearingLengthIn : BEARING_LENGTH_IN, dead.psf, survey.standsOverTenYears ? CD_PERMANENT : CD_TEN_YEARS),
  }
}
