import type { Box, MarkGlyphKind } from './sectionTypes'

const n = (value: number) => Number(value.toFixed(1))

/** Our own line drawing of a mark, hanging from the ceiling line inside its box. */
export function markGlyph(kind: MarkGlyphKind, { x, y, w, h }: Box): string {
  const at = (dx: number, dy: number) => `${n(x + dx * w)} ${n(y + dy * h)}`
  switch (kind) {
    case 'crack': return `M${at(0.5, 0)}L${at(0.32, 0.27)}L${at(0.68, 0.47)}L${at(0.38, 0.7)}L${at(0.58, 1)}`
    case 'sag': return `M${at(0, 0)}Q${at(0.5, 0.9)} ${at(1, 0)}`
    case 'stain': return `M${at(0, 0.04)}C${at(0.05, 0.5)} ${at(0.95, 0.5)} ${at(1, 0.04)}M${at(0.3, 0.04)}C${at(0.34, 0.24)} ${at(0.66, 0.24)} ${at(0.7, 0.04)}M${at(0.5, 0.55)}L${at(0.5, 0.8)}`
    case 'nail-pops': return [0.16, 0.5, 0.84].map(dx => bump(x + dx * w, y, w * 0.16)).join('')
  }
}

function bump(cx: number, y: number, r: number): string {
  return `M${n(cx - r)} ${n(y)}a${n(r)} ${n(r * 1.8)} 0 0 0 ${n(2 * r)} 0`
}

/** An active mark is drawn twice: the second line stands this far from the first. */
export function secondLine(kind: MarkGlyphKind, box: Box): Box {
  return kind === 'crack' ? { ...box, x: box.x + box.w * 0.34 } : { ...box, y: box.y + box.h * 0.2 }
}
