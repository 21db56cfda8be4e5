import type { AtticSurvey, Hole, JoistField, Notch } from '../../types/attic'
import type { HoldReason, HoleProblem, NotchProblem } from '../../types/atticRating'
import { sectionOf } from './joistCapacity'

/** IRC 2018 R502.8.1 and R802.7.1.1: notches and holes in sawn joists, as shares of the joist's depth. */
export const CUT_LIMITS = {
  notchDepthShare: 1 / 6, notchLengthShare: 1 / 3, endNotchDepthShare: 1 / 4,
  holeShare: 1 / 3, holeClearIn: 2,
  /** Nominal 4 in and thicker: no notch in the tension (bottom) edge but at the ends. */
  thickBreadthIn: 3.5,
} as const

export interface NotchLimits { depthIn: number, endDepthIn: number, lengthIn: number }

export function notchLimits(joistDepthIn: number): NotchLimits {
  return {
    depthIn: joistDepthIn * CUT_LIMITS.notchDepthShare,
    endDepthIn: joistDepthIn * CUT_LIMITS.endNotchDepthShare,
    lengthIn: joistDepthIn * CUT_LIMITS.notchLengthShare,
  }
}

export interface HoleLimits { diameterIn: number, edgeDistanceIn: number, betweenHolesIn: number }

export function holeLimits(joistDepthIn: number): HoleLimits {
  return { diameterIn: joistDepthIn * CUT_LIMITS.holeShare, edgeDistanceIn: CUT_LIMITS.holeClearIn, betweenHolesIn: CUT_LIMITS.holeClearIn }
}

interface Member { fieldName: string, breadthIn: number, depthIn: number }

const measured = (value: number | null): value is number => value !== null && Number.isFinite(value) && value >= 0

/** What puts a notch beyond the limits; a notch that is not fully measured cannot be shown to be within them. */
export function notchProblems(notch: Notch, member: Member): NotchProblem[] {
  const { fieldName, breadthIn } = member
  const limits = notchLimits(member.depthIn)
  const problems: NotchProblem[] = []
  const atEnd = notch.place === 'end'
  if (!measured(notch.depthIn) || notch.place === 'unknown' || (!atEnd && !measured(notch.lengthIn))) problems.push({ code: 'notch-not-measured', fieldName })
  const depthLimitIn = atEnd ? limits.endDepthIn : limits.depthIn
  if (measured(notch.depthIn) && notch.depthIn > depthLimitIn) problems.push({ code: 'notch-too-deep', depthIn: notch.depthIn, limitIn: depthLimitIn, fieldName })
  if (!atEnd && measured(notch.lengthIn) && notch.lengthIn > limits.lengthIn) problems.push({ code: 'notch-too-long', lengthIn: notch.lengthIn, limitIn: limits.lengthIn, fieldName })
  if (notch.place === 'middle-third') problems.push({ code: 'notch-in-middle-third', fieldName })
  if (!atEnd && notch.edge !== 'top' && breadthIn >= CUT_LIMITS.thickBreadthIn) {
    problems.push({ code: 'notch-in-bottom-of-thick-joist', breadthIn, limitIn: CUT_LIMITS.thickBreadthIn, fieldName })
  }
  return problems
}

/** What puts a bored hole beyond the limits. */
export function holeProblems(hole: Hole, member: Member): HoleProblem[] {
  const { fieldName } = member
  const limits = holeLimits(member.depthIn)
  const problems: HoleProblem[] = []
  if (!measured(hole.diameterIn) || !measured(hole.edgeDistanceIn)) problems.push({ code: 'hole-not-measured', fieldName })
  if (measured(hole.diameterIn) && hole.diameterIn > limits.diameterIn) problems.push({ code: 'hole-too-large', diameterIn: hole.diameterIn, limitIn: limits.diameterIn, fieldName })
  if (measured(hole.edgeDistanceIn) && hole.edgeDistanceIn < limits.edgeDistanceIn) {
    problems.push({ code: 'hole-near-edge', distanceIn: hole.edgeDistanceIn, limitIn: limits.edgeDistanceIn, fieldName })
  }
  if (measured(hole.nearestOtherIn) && hole.nearestOtherIn < limits.betweenHolesIn) {
    problems.push({ code: 'hole-near-another', distanceIn: hole.nearestOtherIn, limitIn: limits.betweenHolesIn, fieldName })
  }
  return problems
}

function fieldProblems(field: JoistField): HoldReason[] {
  const section = sectionOf(field)
  if (section) {
    const member = { fieldName: field.name, breadthIn: section.breadthIn, depthIn: section.depthIn }
    return [...field.notches.flatMap(notch => notchProblems(notch, member)), ...field.holes.flatMap(hole => holeProblems(hole, member))]
  }
  const unknown: HoldReason[] = []
  if (field.notches.length > 0) unknown.push({ code: 'notch-not-measured', fieldName: field.name })
  if (field.holes.length > 0) unknown.push({ code: 'hole-not-measured', fieldName: field.name })
  return unknown
}

/** Conditions, notches and holes that suspend a rating until somebody has inspected. */
export function holdReasons(survey: Pick<AtticSurvey, 'conditions' | 'joistFields'>): HoldReason[] {
  const conditions = survey.conditions ?? []
  const reasons: HoldReason[] = conditions
    .filter(condition => condition !== 'notched' && condition !== 'bored')
    .map(condition => ({ code: 'condition', condition }))
  reasons.push(...survey.joistFields.flatMap(fieldProblems))
  if (conditions.includes('notched') && survey.joistFields.every(field => field.notches.length === 0)) reasons.push({ code: 'notch-not-measured', fieldName: null })
  if (conditions.includes('bored') && survey.joistFields.every(field => field.holes.length === 0)) reasons.push({ code: 'hole-not-measured', fieldName: null })
  return reasons
}
