import type { JoistMember, JoistRatios, JudgedItem, JudgedJoist, JudgedPlan, LoadField, PlacedItem, PlanLimit } from '../../types/loadPlan'
import { pressurePsf } from '../goods/footprint'
import { checkLoadPlan } from './checkLoadPlan'
import { itemShares, joistLoads } from './itemShares'
import { weakestMember } from './loadField'
import { joistRatios, ratedEffects, ratedTotalLb, sharedTraces } from './loadPlan'
import { loadStateOf } from './loadState'
import { memberRatios } from './memberRatios'
import { traceSpan } from './spanTrace'

export interface JudgeOptions {
  /** The joist itself, for shear and bearing; left out, the weakest is taken. */
  member?: JoistMember
  /** A sound strongback recorded by an engineer's opinion: sharing counts in the verdict. */
  strongbacksCount?: boolean
}

/** Denser than the rating with any part in the middle half of the span (practice). */
export function isHeavyInMiddle(field: Pick<LoadField, 'spanFt' | 'ratedPsf'>, item: Omit<PlacedItem, 'id' | 'yFt'>): boolean {
  const inMiddle = item.xFt < 0.75 * field.spanFt && item.xFt + item.lengthFt > 0.25 * field.spanFt
  return inMiddle && pressurePsf(item.weightLb, item.lengthFt, item.widthFt) > field.ratedPsf * (1 + 1e-9)
}

/** The greatest of the four ratios, and which one it is. */
export function governingLimit(ratios: JoistRatios & { shearRatio: number, bearingRatio: number }): { utilisation: number, limit: PlanLimit } {
  const all: [PlanLimit, number][] = [
    ['moment', ratios.momentRatio], ['deflection', ratios.deflectionRatio], ['shear', ratios.shearRatio], ['bearing', ratios.bearingRatio],
  ]
  const [limit, utilisation] = all.reduce((most, next) => next[1] > most[1] ? next : most)
  return { limit, utilisation }
}

function judgeJoists(field: LoadField, items: PlacedItem[], member: JoistMember, strongbacksCount: boolean): JudgedJoist[] {
  const rated = ratedEffects(field)
  const loads = joistLoads(field, items)
  const traces = loads.map(list => traceSpan(field.spanFt, list))
  const shared = sharedTraces(field, loads, traces)
  return traces.map((trace, joist) => {
    const own = joistRatios(trace, rated)
    const sharedTrace = shared[joist] ?? trace
    const withStrongbacks = sharedTrace === trace ? own : joistRatios(sharedTrace, rated)
    // Shear and bearing never count on sharing: a heavy thing at the wall stands on its own joists.
    const ratios = { ...(strongbacksCount ? withStrongbacks : own), ...memberRatios(field, member, trace) }
    const governing = governingLimit(ratios)
    return { ...ratios, ...governing, state: loadStateOf(governing.utilisation), loadLb: trace.reactionsLb[0] + trace.reactionsLb[1], own, withStrongbacks }
  })
}

function judgeItem(field: LoadField, item: PlacedItem, joists: JudgedJoist[]): JudgedItem {
  const under = item.weightLb > 0 ? itemShares(field, item) : []
  const worst = under.reduce<{ joist: number | null, utilisation: number }>((most, { joist }) => {
    const utilisation = joists[joist]?.utilisation ?? 0
    return most.joist === null || utilisation > most.utilisation ? { joist, utilisation } : most
  }, { joist: null, utilisation: 0 })
  return {
    id: item.id, pressurePsf: pressurePsf(item.weightLb, item.lengthFt, item.widthFt), heavyInMiddle: isHeavyInMiddle(field, item),
    worstJoist: worst.joist, utilisation: worst.utilisation, state: loadStateOf(worst.utilisation),
  }
}

/** The whole verdict on a field: each joist by moment, deflection, shear and bearing, each item, and all of it together. */
export function judgeLoadPlan(field: LoadField, items: PlacedItem[], options: JudgeOptions = {}): JudgedPlan {
  const problems = checkLoadPlan(field, items)
  if (problems.length > 0) return { kind: 'refused', problems }
  const totalLb = items.reduce((sum, item) => sum + item.weightLb, 0)
  if (field.ratedPsf === 0) {
    return { kind: 'nothing-allowed', totalLb, itemIds: items.map(item => item.id), state: totalLb > 0 ? 'over' : 'within' }
  }
  const strongbacksCount = options.strongbacksCount === true && field.strongbacks.some(strongback => strongback.eiLbIn2 > 0)
  const joists = judgeJoists(field, items, options.member ?? weakestMember(), strongbacksCount)
  const worstJoist = joists.reduce((worst, joist, index) => joist.utilisation > (joists[worst]?.utilisation ?? 0) ? index : worst, 0)
  const totalRatio = totalLb / ratedTotalLb(field)
  const utilisation = Math.max(totalRatio, joists[worstJoist]?.utilisation ?? 0)
  return {
    kind: 'judged', totalLb, ratedTotalLb: ratedTotalLb(field), totalRatio, utilisation, state: loadStateOf(utilisation), worstJoist, joists,
    items: items.map(item => judgeItem(field, item, joists)), strongbacksCount, memberAssumed: options.member === undefined,
  }
}
