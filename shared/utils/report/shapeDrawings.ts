import type { MarkKind, MarkShape } from '../../types/mark'

/** Our own line drawings, on a sheet of 90 × 58. `light` parts are drawn thin, `dashed` ones show where the ceiling was. */
export interface ShapeDrawing { main: string, light?: string, dashed?: string, wet?: boolean }

const circle = (x: number, y: number, r: number) => `M${x - r} ${y}a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0`

const drawings: Record<MarkShape, ShapeDrawing> = {
  'straight-line': { main: 'M5 32H85' },
  'wandering-line': { main: 'M8 48 21 39 19 33 38 28 36 21 56 14 82 7' },
  'slanting-line': { main: 'M8 51 82 8' },
  'web-of-lines': { main: 'M9 13 33 23 50 11 80 20 65 46 39 43 33 23M39 43 21 49M65 46 71 55M80 20 86 12' },
  'gap-along-wall': { main: 'M4 22H86M4 27H86', light: 'M4 22V5H86V22M4 27V54M86 27V54' },
  'single-bump': { main: circle(45, 29, 7), light: circle(45, 29, 2) },
  'bumps-in-a-row': { main: [17, 36, 54, 73].map(x => circle(x, 29, 5)).join('') },
  'scattered-bumps': { main: [[18, 17], [40, 41], [62, 15], [74, 40], [30, 27]].map(([x, y]) => circle(x!, y!, 4.5)).join('') },
  'shallow-dish': { main: 'M5 18Q45 38 85 18', dashed: 'M5 18H85' },
  'long-dip': { main: 'M5 18C25 18 25 34 45 34S65 18 85 18', dashed: 'M5 18H85' },
  'round-bulge': { main: 'M5 15Q18 15 24 24C32 52 58 52 66 24Q72 15 85 15', dashed: 'M5 15H85' },
  'ring': { main: 'M18 29c0-12 12-18 27-18s27 6 27 18-12 18-27 18-27-6-27-18z', light: 'M28 29c0-7 7-10 17-10s17 3 17 10-7 10-17 10-17-3-17-10z', wet: true },
  'patch': { main: 'M20 34c-4-11 8-21 20-19 9-7 27-2 29 9 7 9-3 20-16 19-12 7-29 2-33-9z', light: 'M33 30h6M47 24h6M50 36h6', wet: true },
  'streak': { main: 'M34 6c-3 16 4 22 0 45M47 6c4 14-2 24 2 38M57 6c-2 10 2 16 0 26', wet: true },
}

/** The drawing that stands for a whole kind, where one asks "what does it look like?" first. */
const kinds: Record<MarkKind, MarkShape> = { 'crack': 'wandering-line', 'nail-pops': 'bumps-in-a-row', 'sag': 'round-bulge', 'stain': 'ring' }

export function shapeDrawing(shape: MarkShape | MarkKind): ShapeDrawing {
  return drawings[shape in kinds ? kinds[shape as MarkKind] : shape as MarkShape]
}
