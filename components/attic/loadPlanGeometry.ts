import type { LoadPlanField, LoadPlanItem, LoadPlanSpot } from './loadPlanTypes'

/** Moves and sizes go by half feet (look and manners of the plan: ours). */
export const stepFt = 0.5

/** Across the joists, from the first to the last. */
export function fieldDepthFt({ spacingIn, joistCount }: LoadPlanField): number {
  return Math.max(0, joistCount - 1) * spacingIn / 12
}

const clamp = (value: number, from: number, to: number) => Math.min(Math.max(value, from), Math.max(from, to))
const snap = (ft: number) => Math.round(ft / stepFt) * stepFt

/** The nearest place on the half-foot grid, or against the edge, that keeps the item inside the field. */
export function placeInside(field: LoadPlanField, item: LoadPlanSpot, xFt: number, yFt: number): { xFt: number, yFt: number } {
  return {
    xFt: clamp(snap(xFt), 0, field.spanFt - item.lengthFt),
    yFt: clamp(snap(yFt), 0, fieldDepthFt(field) - item.widthFt),
  }
}

/** The nearest size of half feet, at least half a foot, that keeps the item inside the field. */
export function sizeInside(field: LoadPlanField, item: LoadPlanSpot, lengthFt: number, widthFt: number): { lengthFt: number, widthFt: number } {
  return {
    lengthFt: clamp(snap(lengthFt), stepFt, field.spanFt - item.xFt),
    widthFt: clamp(snap(widthFt), stepFt, fieldDepthFt(field) - item.yFt),
  }
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

/** What an arrow key asks for: a move, with Shift a new size. Null for any other key, or when nothing would change. */
export function stepByKey(field: LoadPlanField, item: LoadPlanItem, key: string, shift: boolean):
  { kind: 'move', xFt: number, yFt: number } | { kind: 'resize', lengthFt: number, widthFt: number } | null {
  const arrow = arrows[key]
  if (!arrow) return null
  const [dx, dy] = arrow.map(direction => direction * stepFt) as [number, number]
  if (shift) {
    const size = sizeInside(field, item, item.lengthFt + dx, item.widthFt + dy)
    return size.lengthFt === item.lengthFt && size.widthFt === item.widthFt ? null : { kind: 'resize', ...size }
  }
  const place = placeInside(field, item, item.xFt + dx, item.yFt + dy)
  return place.xFt === item.xFt && place.yFt === item.yFt ? null : { kind: 'move', ...place }
}
