import type { JoistMember, LoadField, LoadPlanProblem, PlanLimit } from '../../types/loadPlan'
import { checkLoadPlan } from './checkLoadPlan'
import { weakestMember } from './loadField'
import { ratedEffects } from './loadPlan'
import { endStrengthLb, shearLb } from './memberRatios'
import { maxDeflection, maxMoment, traceSpan } from './spanTrace'

export interface DistanceRow { distanceFt: number, weightLb: number, limit: PlanLimit }

export type DistanceTable = { kind: 'table', rows: DistanceRow[] } | { kind: 'nothing-allowed' } | { kind: 'refused', problems: LoadPlanProblem[] }

function heaviest(field: LoadField, member: JoistMember, distanceFt: number): DistanceRow {
  const trace = traceSpan(field.spanFt, [{ kind: 'point', lb: 1, atFt: distanceFt }])
  const rated = ratedEffects(field)
  const ends = endStrengthLb(field, member)
  const limits: [PlanLimit, number, number][] = [
    ['moment', rated.momentLbFt, maxMoment(trace).size],
    ['deflection', rated.deflectionLbFt3, maxDeflection(trace).size],
    ['shear', ends.shearLb, shearLb(trace, member)],
    ['bearing', ends.bearingLb, Math.max(...trace.reactionsLb)],
  ]
  return limits.reduce<DistanceRow>((least, [limit, strength, perLb]) => {
    const weightLb = perLb > 0 ? strength / perLb : Number.POSITIVE_INFINITY
    return weightLb < least.weightLb ? { distanceFt, weightLb, limit } : least
  }, { distanceFt, weightLb: Number.POSITIVE_INFINITY, limit: 'bearing' })
}

/** Weight on one joist alone that brings it to 100 %, at each distance asked for, or at 0, 1, 2 … ft from a bearing wall and at mid-span. */
export function distanceFromWall(field: LoadField, member: JoistMember = weakestMember(), distancesFt?: readonly number[]): DistanceTable {
  const problems = checkLoadPlan(field, [])
  if (problems.length > 0) return { kind: 'refused', problems }
  if (field.ratedPsf === 0) return { kind: 'nothing-allowed' }
  const middleFt = field.spanFt / 2
  const distances = distancesFt ?? [...Array.from({ length: Math.ceil(middleFt) }, (_, foot) => foot), middleFt]
  return { kind: 'table', rows: distances.map(distanceFt => heaviest(field, member, distanceFt)) }
}
