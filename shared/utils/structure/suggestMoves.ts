import type { JudgedPlan, LoadField, LoadPlanProblem, LoadState, PlacedItem } from '../../types/loadPlan'
import { itemShares } from './itemShares'
import { judgeLoadPlan } from './judgeLoadPlan'
import type { JudgeOptions } from './judgeLoadPlan'
import { whereMayItGo } from './whereMayItGo'

/** How many moves are put together, and among how many items each is looked for; ours. */
const MOST_MOVES = 4
const MOST_TRIED = 6
/** A move that helps by less is not worth the stairs; ours. */
const LEAST_GAIN = 0.02

/** One thing carried to a better place, and how the whole field stands after it. */
export interface SuggestedMove {
  id: string
  xFt: number
  yFt: number
  lengthFt: number
  widthFt: number
  /** Length and width changed places. */
  turned: boolean
  fromWallFt: number
  /** Of the item, where it then stands. */
  itemUtilisation: number
  itemState: LoadState
  /** Of the whole field, after this move and those before it. */
  utilisation: number
  state: LoadState
}

export type SuggestedMoves
  = | { kind: 'nothing-to-mend' }
    | { kind: 'moves', moves: SuggestedMove[] }
    /** Wherever things stand, they are more than the field is rated for. */
    | { kind: 'too-much', overLb: number }
    | { kind: 'no-better-place' }
    | { kind: 'nothing-allowed' }
    | { kind: 'refused', problems: LoadPlanProblem[] }

type Judged = JudgedPlan & { kind: 'judged' }

/** What is wrong, the worst first: things too dense for the middle, then the most used joist. */
const troubleOf = (plan: Judged): [number, number] => [plan.items.filter(item => item.heavyInMiddle).length, plan.utilisation]
const isMended = (plan: Judged): boolean => plan.state !== 'over' && plan.items.every(item => !item.heavyInMiddle)

/** Items that make the trouble: too dense for the middle, or on the worst joist; those that weigh most on it first. */
function suspects(field: LoadField, plan: Judged, items: readonly PlacedItem[]): PlacedItem[] {
  const judged = new Map(plan.items.map(item => [item.id, item]))
  const onWorst = (item: PlacedItem): number => item.weightLb * (itemShares(field, item).find(({ joist }) => joist === plan.worstJoist)?.share ?? 0)
  return items.filter(item => judged.get(item.id)?.heavyInMiddle || (plan.joists[plan.worstJoist]?.state === 'over' && onWorst(item) > 0))
    .sort((a, b) => Number(judged.get(b.id)?.heavyInMiddle) - Number(judged.get(a.id)?.heavyInMiddle) || onWorst(b) - onWorst(a))
    .slice(0, MOST_TRIED)
}

interface Step { move: SuggestedMove, plan: Judged, items: PlacedItem[] }

function tryOut(field: LoadField, items: readonly PlacedItem[], before: PlacedItem, turned: boolean, options: JudgeOptions): Step | null {
  const item = turned ? { ...before, lengthFt: before.widthFt, widthFt: before.lengthFt } : before
  const { id, lengthFt, widthFt } = item
  const places = whereMayItGo(field, items.filter(other => other.id !== id), item, options)
  const [spot] = places.kind === 'places' ? places.best : []
  if (!spot || (!turned && spot.xFt === item.xFt && spot.yFt === item.yFt)) return null
  const { xFt, yFt, fromWallFt, state: itemState } = spot
  const moved = items.map(other => other.id === id ? { ...item, xFt, yFt } : other)
  const plan = judgeLoadPlan(field, moved, options)
  if (plan.kind !== 'judged') return null
  const itemUtilisation = plan.items.find(one => one.id === id)?.utilisation ?? 0
  return { plan, items: moved, move: { id, xFt, yFt, lengthFt, widthFt, turned, fromWallFt, itemUtilisation, itemState, utilisation: plan.utilisation, state: plan.state } }
}

/** As it lies, and turned where that makes a difference. */
const ways = (item: PlacedItem): boolean[] => item.lengthFt === item.widthFt ? [false] : [false, true]

function* bestStep(field: LoadField, plan: Judged, items: readonly PlacedItem[], options: JudgeOptions): Generator<void, Step | null> {
  const [denseNow, utilisationNow] = troubleOf(plan)
  let best: Step | null = null
  for (const suspect of suspects(field, plan, items)) {
    for (const turned of ways(suspect)) {
      const step = tryOut(field, items, suspect, turned, options)
      yield
      if (!step) continue
      const [dense, utilisation] = troubleOf(step.plan)
      const helps = dense < denseNow ? utilisation <= Math.max(1, utilisationNow) : dense === denseNow && utilisation <= utilisationNow - LEAST_GAIN
      const [bestDense, bestUtilisation] = best ? troubleOf(best.plan) : [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY]
      if (helps && (dense < bestDense || (dense === bestDense && utilisation < bestUtilisation))) best = step
    }
  }
  return best
}

/** The same as `suggestMoves`, pausing after each place that was looked for: a screen goes on with its own work between. */
export function* suggestingMoves(field: LoadField, items: readonly PlacedItem[], options: JudgeOptions = {}): Generator<void, SuggestedMoves> {
  const first = judgeLoadPlan(field, [...items], options)
  if (first.kind !== 'judged') return first.kind === 'refused' ? first : { kind: 'nothing-allowed' }
  if (isMended(first)) return { kind: 'nothing-to-mend' }
  if (first.totalRatio > 1) return { kind: 'too-much', overLb: first.totalLb - first.ratedTotalLb }
  const moves: SuggestedMove[] = []
  let [plan, standing]: [Judged, readonly PlacedItem[]] = [first, items]
  while (moves.length < MOST_MOVES && !isMended(plan)) {
    const step: Step | null = yield* bestStep(field, plan, standing, options)
    if (!step) break
    moves.push(step.move)
    plan = step.plan
    standing = step.items
  }
  return moves.length > 0 ? { kind: 'moves', moves } : { kind: 'no-better-place' }
}

/** Which things to carry where, and whether turned, one after the other, until the field is no longer over; each move is the best single one. */
export function suggestMoves(field: LoadField, items: readonly PlacedItem[], options: JudgeOptions = {}): SuggestedMoves {
  const search = suggestingMoves(field, items, options)
  for (;;) {
    const step = search.next()
    if (step.done) return step.value
  }
}
