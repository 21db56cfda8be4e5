/** A joist field seen from above, as lines and areas in a box of any size: the same drawing on paper and on the screen. */

export interface DrawnLine { fromX: number, fromY: number, toX: number, toY: number, part: 'wall' | 'joist' | 'edge-of-middle' }
export interface DrawnZone { fromX: number, toX: number, part: 'wall-zone' | 'middle-half' }
export interface FieldDrawing { lines: DrawnLine[], zones: DrawnZone[] }

/** More lines than this would run together in print; the count stands beside the drawing. */
const MOST_JOISTS = 24
/** Between the two lines of a bearing wall, as a share of the drawing's width. */
const WALL_SHARE = 0.012

/** Span from left to right. Widths are to the span's scale, the distance across is not. */
export function fieldDrawing({ joistCount }: { joistCount: number }, width: number, height: number): FieldDrawing {
  const wall = width * WALL_SHARE
  const joists = Math.max(2, Math.min(joistCount, MOST_JOISTS))
  const upright = (x: number, part: DrawnLine['part']): DrawnLine => ({ fromX: x, fromY: 0, toX: x, toY: height, part })
  return {
    lines: [
      ...Array.from({ length: joists }, (_, index): DrawnLine => {
        const y = height * (index + 0.5) / joists
        return { fromX: 0, fromY: y, toX: width, toY: y, part: 'joist' }
      }),
      upright(width / 4, 'edge-of-middle'), upright(width * 3 / 4, 'edge-of-middle'),
      ...[0, wall, width - wall, width].map(x => upright(x, 'wall')),
    ],
    zones: [
      { fromX: 0, toX: width / 4, part: 'wall-zone' },
      { fromX: width / 4, toX: width * 3 / 4, part: 'middle-half' },
      { fromX: width * 3 / 4, toX: width, part: 'wall-zone' },
    ],
  }
}
