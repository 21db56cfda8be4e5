import type { HatchCardFieldText } from '../../../shared/utils/messages/hatchCardMessages'
import { fieldDrawing } from '../../../shared/utils/papers/fieldDrawing'
import { FIELD_ZONE_WORDS } from '../../../shared/utils/messages/hatchCardMessages'
import { GRAPHITE, INK, RULE, type Paper } from './paper'
import { drawHatch, type Area } from './paperShapes'
import { drawText } from './paperText'

/** One joist field from above: walls as double lines, joists thin, the middle half ruled, each zone with its words and width. Answers where it ends. */
export function drawField(paper: Paper, field: HatchCardFieldText, { xPt, yPt, widthPt, heightPt }: Area, sizePt: number): number {
  const top = drawText(paper, field.title, { xPt, yPt, widthPt }, { sizePt, weight: 800 }) + 1
  const { wall, middle } = FIELD_ZONE_WORDS
  const zoneTop = overZones(paper, [wall, middle, wall], { xPt, yPt: top, widthPt }, { sizePt, weight: 600 }) + 2
  drawJoists(paper, field.joistCount, { xPt, yPt: zoneTop, widthPt, heightPt })
  const measures = { sizePt: sizePt - 0.5, colour: GRAPHITE }
  const below = overZones(paper, [field.quarter, field.half, field.quarter], { xPt, yPt: zoneTop + heightPt + 3, widthPt }, measures)
  return drawText(paper, field.span, { xPt, yPt: below, widthPt }, { ...measures, align: 'center' })
}

interface Row { xPt: number, yPt: number, widthPt: number }

function overZones(paper: Paper, [left, middle, right]: [string, string, string], { xPt, yPt, widthPt }: Row, style: { sizePt: number, weight?: 600, colour?: string }): number {
  const centred = { ...style, align: 'center' as const }
  const quarter = widthPt / 4
  return Math.max(
    drawText(paper, left, { xPt, yPt, widthPt: quarter }, centred),
    drawText(paper, middle, { xPt: xPt + quarter, yPt, widthPt: 2 * quarter }, centred),
    drawText(paper, right, { xPt: xPt + 3 * quarter, yPt, widthPt: quarter }, centred),
  )
}

function drawJoists(paper: Paper, joistCount: number, { xPt, yPt, widthPt, heightPt }: Area) {
  const { lines, zones } = fieldDrawing({ joistCount }, widthPt, heightPt)
  for (const { fromX, toX, part } of zones) {
    if (part === 'middle-half') drawHatch(paper, { xPt: xPt + fromX, yPt, widthPt: toX - fromX, heightPt }, 'single', { stepPt: 7, colour: RULE })
  }
  for (const { fromX, fromY, toX, toY, part } of lines) {
    paper.doc.moveTo(xPt + fromX, yPt + fromY).lineTo(xPt + toX, yPt + toY)
      .lineWidth({ 'joist': 0.6, 'wall': 1.6, 'edge-of-middle': 0.9 }[part]).stroke(part === 'joist' ? GRAPHITE : INK)
  }
}
