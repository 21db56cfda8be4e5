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
  /** To another field of the same attic; null within its own. */
  toField: number | null
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

/** Another field of the same attic that may take something over. */
export interface OtherField { number: number, field: LoadField, items: readonly PlacedItem[], options: JudgeOptions }

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

const heaviest = (items: readonly PlacedItem[]): PlacedItem[] => [...items].sort((a, b) => b.weightLb - a.weightLb).slice(0, MOST_TRIED)

interface Step { move: SuggestedMove, plan: Judged, items: PlacedItem[], others: readonly OtherField[] }

interface Standing { field: LoadField, items: readonly PlacedItem[], options: JudgeOptions, others: readonly OtherField[] }

const turnedOver = (item: PlacedItem, turned: boolean): PlacedItem => turned ? { ...item, lengthFt: item.widthFt, widthFt: item.lengthFt } : item

function tryOut({ field, items, options, others }: Standing, before: PlacedItem, turned: boolean): Step | null {
  const item = turnedOver(before, turned)
  const { id, lengthFt, widthFt } = item
  const places = whereMayItGo(field, items.filter(other => other.id !== id), item, options)
  const [spot] = places.kind === 'places' ? places.best : []
  if (!spot || (!turned && spot.xFt === item.xFt && spot.yFt === item.yFt)) return null
  const { xFt, yFt, fromWallFt, state: itemState } = spot
  const moved = items.map(other => other.id === id ? { ...item, xFt, yFt } : other)
  const plan = judgeLoadPlan(field, moved, options)
  if (plan.kind !== 'judged') return null
  const itemUtilisation = plan.items.find(one => one.id === id)?.utilisation ?? 0
  return { plan, items: moved, others, move: { id, xFt, yFt, lengthFt, widthFt, turned, toField: null, fromWallFt, itemUtilisation, itemState, utilisation: plan.utilisation, state: plan.state } }
}

/** Carried over to another field that then still is not over. */
function tryElsewhere({ field, items, options, others }: Standing, before: PlacedItem, turned: boolean, to: OtherField): Step | null {
  const item = turnedOver(before, turned)
  const places = whereMayItGo(to.field, [...to.items], item, to.options)
  const [spot] = places.kind === 'places' ? places.best : []
  if (!spot) return null
  const left = items.filter(other => other.id !== item.id)
  const itemsThere = [...to.items, { ...item, xFt: spot.xFt, yFt: spot.yFt }]
  const [plan, there] = [judgeLoadPlan(field, left, options), judgeLoadPlan(to.field, itemsThere, to.options)]
  if (plan.kind !== 'judged' || there.kind !== 'judged' || there.state === 'over') return null
  const { id, lengthFt, widthFt } = item
  const { xFt, yFt, fromWallFt, state: itemState, utilisation: itemUtilisation } = spot
  const worse = there.utilisation > plan.utilisation ? there : plan
  return {
    plan, items: left, others: others.map(other => other.number === to.number ? { ...other, items: itemsThere } : other),
    move: { id, xFt, yFt, lengthFt, widthFt, turned, toField: to.number, fromWallFt, itemUtilisation, itemState, utilisation: worse.utilisation, state: worse.state },
  }
}

/** As it lies, and turned where that makes a difference. */
const ways = (item: PlacedItem): boolean[] => item.lengthFt === item.widthFt ? [false] : [false, true]

/** What moves a step would be chosen from: first within the field, then over to others. */
function* steps(standing: Standing, suspected: readonly PlacedItem[], elsewhere: boolean): Generator<Step | null, void> {
  for (const suspect of suspected) {
    for (const turned of ways(suspect)) {
      if (!elsewhere) yield tryOut(standing, suspect, turned)
      else for (const other of standing.others) yield tryElsewhere(standing, suspect, turned, other)
    }
  }
}

function helps(now: Judged, then: Judged): boolean {
  const [[denseNow, utilisationNow], [dense, utilisation]] = [troubleOf(now), troubleOf(then)]
  return dense < denseNow ? utilisation <= Math.max(1, utilisationNow) : dense === denseNow && utilisation <= utilisationNow - LEAST_GAIN
}

function isBetter(one: Judged, other: Judged | undefined): boolean {
  const [[dense, utilisation], [otherDense, otherUtilisation]] = [troubleOf(one), other ? troubleOf(other) : [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY]]
  return dense < otherDense || (dense === otherDense && utilisation < otherUtilisation)
}

function* bestStep(plan: Judged, standing: Standing): Generator<void, Step | null> {
  // With more than the rated total up there, no move within the field can mend it.
  const isTooMuch = plan.totalRatio > 1
  const suspected = isTooMuch ? heaviest(standing.items) : suspects(standing.field, plan, standing.items)
  for (const elsewhere of isTooMuch ? [true] : [false, true]) {
    let best: Step | null = null
    for (const step of steps(standing, suspected, elsewhere)) {
      yield
      if (step && helps(plan, step.plan) && isBetter(step.plan, best?.plan)) best = step
    }
    if (best) return best
  }
  return null
}

/**
 * The same as `suggestMoves`, pausing after each place that was looked for: a screen goes on with its own work between.
 */
export function* suggestingMoves(field: LoadField, items: readonly PlacedItem[], options: JudgeOptions = {}, others: readonly OtherField[] = []): Generator<void, SuggestedMoves> {
  const first = judgeLoadPlan(field, [...items], options)
  if (first.kind !== 'judged') return first.kind === 'refused' ? first : { kind: 'nothing-allowed' }
  if (isMended(first)) return { kind: 'nothing-to-mend' }
  const moves: SuggestedMove[] = []
  let plan: Judged = first
  let standing: Standing = { field, items, options, others }
  while (moves.length < MOST_MOVES && !isMended(plan)) {
    const step: Step | null = yield* bestStep(plan, standing)
    if (!step) break
    moves.push(step.move)
    plan = step.plan
    standing = { ...standing, items: step.items, others: step.others }
  }
  if (moves.length > 0) return { kind: 'moves', moves }
  return first.totalRatio > 1 ? { kind: 'too-much', overLb: first.totalLb - first.ratedTotalLb } : { kind: 'no-better-place' }
}

/** Which things to carry where, and whether turned, one after the other, until the field is no longer over; each move is the best single one. */
export function suggestMoves(field: LoadField, items: readonly PlacedItem[], options: JudgeOptions = {}, others: readonly OtherField[] = []): SuggestedMoves {
  const search = suggestingMoves(field, items, options, others)
  for (;;) {
    const step = search.next()
    if (step.done) return step.value
  }
}
