import type { JoistMember, LoadField, LoadPlanProblem, LoadState, PlacedItem } from '../../types/loadPlan'
import { checkLoadPlan, fieldWidthFt } from './checkLoadPlan'
import { itemShares, joistLoads } from './itemShares'
import type { JoistShare } from './itemShares'
import { isHeavyInMiddle } from './judgeLoadPlan'
import type { JudgeOptions } from './judgeLoadPlan'
import { weakestMember } from './loadField'
import { ratedEffects, ratedTotalLb, ratioOf } from './loadPlan'
import type { RatedEffects } from './loadPlan'
import { loadStateOf } from './loadState'
import { endRatios, shearSectionFt } from './memberRatios'
import { spanSweeper, sweepLoads } from './spanSweep'
import type { SweepLoads } from './spanSweep'

export const GRID_FT = 0.5
/** How many places are suggested; ours. */
const MOST_SUGGESTED = 5

export type NewItem = Pick<PlacedItem, 'lengthFt' | 'widthFt' | 'weightLb'>

export interface Spot {
  xFt: number
  yFt: number
  /** The most used joist under the item if it stood here. */
  utilisation: number
  state: LoadState
  heavyInMiddle: boolean
  /** No other item stands here. */
  free: boolean
  /** From the nearer bearing wall to the item's nearer edge. */
  fromWallFt: number
}

export type Places
  = | { kind: 'places', totalRatio: number, spots: Spot[], best: Spot[] }
    | { kind: 'larger-than-field', spanFt: number, fieldWidthFt: number }
    | { kind: 'nothing-allowed' }
    | { kind: 'refused', problems: LoadPlanProblem[] }

/** 0, ½, 1 … and the last place that still fits. */
function gridFt(roomFt: number): number[] {
  const steps = Math.floor(roomFt / GRID_FT + 1e-9)
  const places = Array.from({ length: steps + 1 }, (_, step) => step * GRID_FT)
  return roomFt - steps * GRID_FT > 1e-6 ? [...places, roomFt] : places
}

const apart = (fromA: number, sizeA: number, fromB: number, sizeB: number): boolean => fromA + sizeA <= fromB + 1e-9 || fromB + sizeB <= fromA + 1e-9
const overlaps = (a: Omit<PlacedItem, 'id' | 'weightLb'>, b: Omit<PlacedItem, 'id' | 'weightLb'>): boolean =>
  !apart(a.xFt, a.lengthFt, b.xFt, b.lengthFt) && !apart(a.yFt, a.widthFt, b.yFt, b.widthFt)

/** Least used first, then nearest to a bearing wall; the suggested places do not overlap. */
function bestOf(spots: Spot[], { lengthFt, widthFt }: NewItem): Spot[] {
  const lying = ({ xFt, yFt }: Spot) => ({ xFt, yFt, lengthFt, widthFt })
  const fit = spots.filter(spot => spot.state !== 'over' && spot.free && !spot.heavyInMiddle)
    .sort((a, b) => a.utilisation - b.utilisation || a.fromWallFt - b.fromWallFt)
  const best: Spot[] = []
  for (const spot of fit) {
    if (best.every(chosen => !overlaps(lying(spot), lying(chosen)))) best.push(spot)
    if (best.length === MOST_SUGGESTED) break
  }
  return best
}

/** What the joists carry already, ready to be asked about one more load anywhere. */
interface Standing { field: LoadField, member: JoistMember, rated: RatedEffects, loads: SweepLoads[], sweep: ReturnType<typeof spanSweeper> }

function standing(field: LoadField, items: PlacedItem[], member: JoistMember): Standing {
  const lists = joistLoads(field, items)
  const most = lists.reduce((longest, list) => Math.max(longest, list.length), 0)
  return {
    field, member, rated: ratedEffects(field), loads: lists.map(list => sweepLoads(field.spanFt, list)),
    sweep: spanSweeper(field.spanFt, shearSectionFt(member, field.spanFt), most),
  }
}

/** The most used joist under an item that would stand here. */
function utilisationAt({ field, member, rated, loads, sweep }: Standing, item: NewItem, xFt: number, shares: readonly JoistShare[]): number {
  let most = 0
  for (const { joist, share } of shares) {
    const own = loads[joist]
    if (!own) continue
    const effects = sweep(own, { lbPerFt: item.weightLb * share / item.lengthFt, fromFt: xFt, toFt: Math.min(field.spanFt, xFt + item.lengthFt), pointLb: 0 })
    const ends = endRatios(field, member, effects.shearLb, effects.reactionLb)
    most = Math.max(most, ratioOf(effects.momentLbFt, rated.momentLbFt), ratioOf(effects.deflectionLbFt3, rated.deflectionLbFt3), ends.shearRatio, ends.bearingRatio)
  }
  return most
}

/**
 * Every place on a ½ ft grid where an item could stand, with the utilisation that would result. Sharing by strongbacks is
 * left out, on the safe side. Nothing is suggested when the total would pass the rated total.
 */
export function whereMayItGo(field: LoadField, items: PlacedItem[], item: NewItem, options: Pick<JudgeOptions, 'member'> = {}): Places {
  const problems = checkLoadPlan(field, [...items, { ...item, id: 'new', xFt: 0, yFt: 0 }])
  if (problems.some(problem => problem.code !== 'outside-field' || problem.at.part !== 'item' || problem.at.id !== 'new')) return { kind: 'refused', problems }
  if (problems.length > 0) return { kind: 'larger-than-field', spanFt: field.spanFt, fieldWidthFt: fieldWidthFt(field) }
  if (field.ratedPsf === 0) return { kind: 'nothing-allowed' }
  const now = standing(field, items, options.member ?? weakestMember())
  const spots: Spot[] = []
  const across = gridFt(field.spanFt - item.lengthFt)
  for (const yFt of gridFt(fieldWidthFt(field) - item.widthFt)) {
    const shares = itemShares(field, { yFt, widthFt: item.widthFt })
    const beside = items.filter(other => !apart(yFt, item.widthFt, other.yFt, other.widthFt))
    for (const xFt of across) {
      const utilisation = utilisationAt(now, item, xFt, shares)
      spots.push({
        xFt, yFt, utilisation, state: loadStateOf(utilisation), heavyInMiddle: isHeavyInMiddle(field, { ...item, xFt }),
        free: beside.every(other => apart(xFt, item.lengthFt, other.xFt, other.lengthFt)), fromWallFt: Math.min(xFt, field.spanFt - xFt - item.lengthFt),
      })
    }
  }
  const totalRatio = items.reduce((sum, other) => sum + other.weightLb, item.weightLb) / ratedTotalLb(field)
  return { kind: 'places', totalRatio, spots, best: loadStateOf(totalRatio) === 'over' ? [] : bestOf(spots, item) }
}
