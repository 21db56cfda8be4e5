import type { JoistMember, LoadField } from '../../types/loadPlan'
import type { SpanTrace } from './spanTrace'
import { shearLbAt } from './spanTrace'

/** Where shear is looked at: one depth from the support (NDS 3.4.3.1), for stubby joists at most a quarter span. */
export function shearSectionFt(member: Pick<JoistMember, 'depthIn'>, spanFt: number): number {
  return Math.min(member.depthIn / 12, spanFt / 4)
}

/** Greatest shear between the two sections one depth from the supports, lb. */
export function shearLb(trace: SpanTrace, member: JoistMember): number {
  const sectionFt = shearSectionFt(member, trace.spanFt)
  return Math.max(Math.abs(shearLbAt(trace, sectionFt)), Math.abs(shearLbAt(trace, trace.spanFt - sectionFt)))
}

/** Stored load against what the dead load leaves; where that leaves nothing, all of the load against all of the strength. */
function shareOf(loadLb: number, strengthLb: number, deadLb: number): number {
  return strengthLb > deadLb ? loadLb / (strengthLb - deadLb) : (loadLb + deadLb) / strengthLb
}

/** Strength left for stored load at a joist's end, lb. */
export function endStrengthLb(field: Pick<LoadField, 'spanFt' | 'spacingIn'>, member: JoistMember): { shearLb: number, bearingLb: number, deadShearLb: number, deadBearingLb: number } {
  const deadLbPerFt = member.deadPsf * field.spacingIn / 12
  const deadBearingLb = deadLbPerFt * field.spanFt / 2
  const deadShearLb = deadLbPerFt * (field.spanFt / 2 - shearSectionFt(member, field.spanFt))
  return { shearLb: Math.max(0, member.shearLb - deadShearLb), bearingLb: Math.max(0, member.bearingLb - deadBearingLb), deadShearLb, deadBearingLb }
}

/** Shear and bearing against the joist's own strength, less the dead load, so that heavy things may stand at a bearing wall. */
export function endRatios(field: Pick<LoadField, 'spanFt' | 'spacingIn'>, member: JoistMember, storedShearLb: number, reactionLb: number): { shearRatio: number, bearingRatio: number } {
  const { deadShearLb, deadBearingLb } = endStrengthLb(field, member)
  return { shearRatio: shareOf(storedShearLb, member.shearLb, deadShearLb), bearingRatio: shareOf(reactionLb, member.bearingLb, deadBearingLb) }
}

export function memberRatios(field: Pick<LoadField, 'spanFt' | 'spacingIn'>, member: JoistMember, trace: SpanTrace): { shearRatio: number, bearingRatio: number } {
  return endRatios(field, member, shearLb(trace, member), Math.max(...trace.reactionsLb))
}
