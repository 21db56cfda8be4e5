import { shapeDrawing } from '../../../shared/utils/report/shapeDrawings'
import type { MarkKind, MarkShape } from '../../../shared/types/mark'
import { GRAPHITE, INK, RULE, type Paper } from './paper'

/** The sheet the shape drawings are made on. */
const SHEET = { width: 90, height: 58 } as const

/** One of our line drawings of a mark, in its frame. Answers how high it is. */
export function drawShape({ doc }: Paper, shape: MarkShape | MarkKind, xPt: number, yPt: number, widthPt: number): number {
  const { main, light, dashed } = shapeDrawing(shape)
  doc.save().translate(xPt, yPt).scale(widthPt / SHEET.width)
  doc.rect(0, 0, SHEET.width, SHEET.height).lineWidth(1).stroke(RULE)
  if (dashed) doc.path(dashed).lineWidth(1.4).dash(3, { space: 3 }).stroke(GRAPHITE).undash()
  if (light) doc.path(light).lineWidth(1.2).stroke(INK)
  doc.path(main).lineWidth(2.4).lineJoin('round').stroke(INK)
  doc.restore()
  return SHEET.height * widthPt / SHEET.width
}
