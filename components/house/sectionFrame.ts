import type { SectionFrame, SectionRoom } from './sectionTypes'

/** Both roof lines and a hair of air lie within this depth under the ridge line. */
export const roofDepthPx = 11

/** Height the roof still has over the joists at the wall, so that things at the eaves can be drawn. */
const heelPx = { strip: 30, thumb: 9 }

export function sectionFrame(widthPx: number, size: 'strip' | 'thumb'): SectionFrame {
  const strip = size === 'strip'
  const overhang = Math.max(strip ? 12 : 7, widthPx * 0.028)
  const ridgeY = strip ? 6 : 2
  const atticPx = strip ? Math.min(168, Math.max(118, widthPx * 0.19)) : widthPx * 0.235
  const joistTopY = ridgeY + atticPx
  const ceilingY = joistTopY + (strip ? 12 : 4)
  const groundY = ceilingY + (strip ? 112 : widthPx * 0.17)
  const wallLeft = overhang
  const wallRight = widthPx - overhang
  const fall = (joistTopY - heelPx[size] - ridgeY) / ((wallRight - wallLeft) / 2)
  return { widthPx, heightPx: groundY + 2, ridgeX: widthPx / 2, ridgeY, fall, wallLeft, wallRight, joistTopY, ceilingY, groundY }
}

/** The upper roof line at x. */
export function roofYAt(frame: SectionFrame, x: number): number {
  return frame.ridgeY + frame.fall * Math.abs(x - frame.ridgeX)
}

/** The lowest x at which something of this height standing on the joists stays under the roof. */
export function eaveLimit(frame: SectionFrame, heightPx: number): number {
  const halfPx = (frame.joistTopY - heightPx - roofDepthPx - frame.ridgeY) / frame.fall
  return Math.max(frame.wallLeft + 2, frame.ridgeX - halfPx)
}

export function sectionWalls(frame: SectionFrame, rooms: readonly SectionRoom[]): { x: number, thick: boolean }[] {
  const total = rooms.reduce((sum, room) => sum + Math.max(0, room.widthShare), 0)
  if (total <= 0) return []
  const length = frame.wallRight - frame.wallLeft
  let share = 0
  return rooms.slice(0, -1).map((room) => {
    share += Math.max(0, room.widthShare) / total
    return { x: frame.wallLeft + share * length, thick: room.bearingAfter ?? false }
  })
}
