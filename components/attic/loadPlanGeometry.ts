import type { LoadPlanChange, LoadPlanCorner, LoadPlanField, LoadPlanSpot } from './loadPlanTypes'

type Placed = LoadPlanSpot & { id: string }

/** Moves and sizes go by half feet (look and manners of the plan: ours). */
export const stepFt = 0.5

/** Across the joists, from the first to the last. */
export function fieldDepthFt({ spacingIn, joistCount }: LoadPlanField): number {
  return Math.max(0, joistCount - 1) * spacingIn / 12
}

const clamp = (value: number, from: number, to: number) => Math.min(Math.max(value, from), Math.max(from, to))
const snap = (ft: number) => Math.round(ft / stepFt) * stepFt

/**
 * Several items moved by the same step: `lead` lands on the half-foot grid, and the edge of the field stops them all as
 * soon as it stops one.
 */
export function moveTogether(field: LoadPlanField, items: readonly Placed[], lead: Placed, dxFt: number, dyFt: number): LoadPlanChange[] {
  const least = (room: (item: Placed) => number) => Math.min(...items.map(room))
  const dx = clamp(snap(lead.xFt + dxFt) - lead.xFt, -least(item => item.xFt), least(item => field.spanFt - item.xFt - item.lengthFt))
  const dy = clamp(snap(lead.yFt + dyFt) - lead.yFt, -least(item => item.yFt), least(item => fieldDepthFt(field) - item.yFt - item.widthFt))
  return items.map(({ id, xFt, yFt }) => ({ id, xFt: xFt + dx, yFt: yFt + dy }))
}

/** One edge pulled by so much: where it lies then, on the half-foot grid, inside the field, half a foot from the other at least. */
function pulledEdge(from: number, size: number, by: number, isFirst: boolean, limit: number): { from: number, size: number } {
  if (!isFirst) return { from, size: clamp(snap(size + by), stepFt, limit - from) }
  const edge = clamp(snap(from + by), 0, from + size - stepFt)
  return { from: edge, size: from + size - edge }
}

/** An item sized by one of its corners; the corner across from it stays. */
export function sizeFromCorner(field: LoadPlanField, item: LoadPlanSpot, corner: LoadPlanCorner, dxFt: number, dyFt: number): LoadPlanSpot {
  const x = pulledEdge(item.xFt, item.lengthFt, dxFt, corner.x === 'start', field.spanFt)
  const y = pulledEdge(item.yFt, item.widthFt, dyFt, corner.y === 'first', fieldDepthFt(field))
  return { xFt: x.from, lengthFt: x.size, yFt: y.from, widthFt: y.size }
}

/** Length and width changed places, kept inside the field; null where it does not fit. */
export function turnInside(field: LoadPlanField, item: LoadPlanSpot): LoadPlanSpot | null {
  const turned = { ...item, lengthFt: item.widthFt, widthFt: item.lengthFt }
  if (turned.lengthFt > field.spanFt || turned.widthFt > fieldDepthFt(field)) return null
  return { ...turned, xFt: clamp(item.xFt, 0, field.spanFt - turned.lengthFt), yFt: clamp(item.yFt, 0, fieldDepthFt(field) - turned.widthFt) }
}

/** Which joists an item stands on or between, counted from 1. */
export function joistsUnder(field: LoadPlanField, item: LoadPlanSpot): { from: number, to: number } {
  const spacingFt = field.spacingIn / 12
  const last = field.joistCount
  return {
    from: clamp(Math.floor(item.yFt / spacingFt + 1e-9) + 1, 1, last),
    to: clamp(Math.ceil((item.yFt + item.widthFt) / spacingFt - 1e-9) + 1, 1, last),
  }
}

/** The wall the item is nearer to, and how far its near edge is from it. */
export function nearerWall(field: LoadPlanField, item: LoadPlanSpot): { wall: 'start' | 'end', distanceFt: number } {
  const toEnd = field.spanFt - item.xFt - item.lengthFt
  return item.xFt <= toEnd ? { wall: 'start', distanceFt: item.xFt } : { wall: 'end', distanceFt: Math.max(0, toEnd) }
}

const arrows: Record<string, [number, number]> = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] }
export const isArrow = (key: string): boolean => key in arrows

/** What an arrow key asks of the chosen items: a move by half a foot, with Shift a new size. Empty for other keys, or at the edge. */
export function stepByKey(field: LoadPlanField, items: readonly Placed[], key: string, shift: boolean): LoadPlanChange[] {
  const arrow = arrows[key]
  const [lead] = items
  if (!arrow || !lead) return []
  const [dx, dy] = [arrow[0] * stepFt, arrow[1] * stepFt]
  const changes = shift
    ? items.map((item): LoadPlanChange => {
        const { lengthFt, widthFt } = sizeFromCorner(field, item, { x: 'end', y: 'last' }, dx, dy)
        return { id: item.id, ...dx !== 0 && { lengthFt }, ...dy !== 0 && { widthFt } }
      })
    : moveTogether(field, items, lead, dx, dy)
  return isChange(items, changes) ? changes : []
}

/** Whether anything would lie elsewhere than it does. */
export function isChange(items: readonly Placed[], changes: readonly LoadPlanChange[]): boolean {
  return changes.some((change) => {
    const item = items.find(one => one.id === change.id)
    return item !== undefined && (['xFt', 'yFt', 'lengthFt', 'widthFt'] as const).some(measure => change[measure] !== undefined && Math.abs(change[measure] - item[measure]) > 1e-9)
  })
}
