/** Our own gauge card: lines of known width that run out to the card's edge, and two lines of known length that show how it was printed. */

/** Fine lines on one edge, coarse ones on the other. A printer's dot is about 0.04 mm at 600 dots an inch (arithmetic), so nothing is finer than 0.2 mm. */
export const FINE_LINES_MM = [0.2, 0.3, 0.4, 0.5, 0.6, 0.8, 1, 1.2, 1.5, 1.8] as const
export const COARSE_LINES_MM = [2, 2.5, 3, 3.5, 4, 5, 6, 8, 10] as const

/** Lengths of the two check lines. */
export const CHECK_LENGTHS = { mm: 100, in: 4 } as const
export type CheckUnit = keyof typeof CHECK_LENGTHS

/** Ours: within one part in a hundred a 10 mm line is out by less than half of what the eye tells apart on the card. */
const TOLERANCE = 0.01
/** Ours: beyond these it was measured in another unit, or along another line. */
const LEAST_SCALE = 0.5
const MOST_SCALE = 1.6

export type GaugeCheck
  = | { kind: 'true' }
    | { kind: 'too-small' | 'too-large', scale: number }
    | { kind: 'not-that-line' }

/** Was the card printed at its true size? `scale` is printed over true length. */
export function gaugeCheck(measured: number, unit: CheckUnit): GaugeCheck {
  const scale = measured / CHECK_LENGTHS[unit]
  if (!(scale >= LEAST_SCALE && scale <= MOST_SCALE)) return { kind: 'not-that-line' }
  if (Math.abs(scale - 1) <= TOLERANCE + 1e-9) return { kind: 'true' }
  return { kind: scale < 1 ? 'too-small' : 'too-large', scale }
}

export interface PlacedLine { widthMm: number, middleMm: number }

/** Lines side by side along an edge, each with the same white between it and the next, so that thick ones get more room. */
export function placeLines(widthsMm: readonly number[], edgeMm: number): PlacedLine[] {
  const whiteMm = (edgeMm - widthsMm.reduce((sum, width) => sum + width, 0)) / (widthsMm.length + 1)
  let atMm = whiteMm
  return widthsMm.map((widthMm) => {
    const line = { widthMm, middleMm: atMm + widthMm / 2 }
    atMm += widthMm + whiteMm
    return line
  })
}
