import type { Paper } from './paper'
import { GRAPHITE, needRoom } from './paper'
import { drawRule } from './paperShapes'
import { drawText, textHeightPt } from './paperText'

export interface PaperTable { columns: readonly string[], rows: readonly (readonly string[])[] }

/** Ruled table: the first column is text and takes `firstShare` of the width, the others are figures at the right of theirs. */
export function drawTable(paper: Paper, { columns, rows }: PaperTable, { sizePt, firstShare = 0.5 }: { sizePt: number, firstShare?: number }) {
  const first = paper.widthPt * firstShare
  const other = (paper.widthPt - first) / Math.max(1, columns.length - 1)
  const write = (cells: readonly string[], style: { sizePt: number, weight: 400 | 600 | 800, colour?: string }) => {
    const widths = cells.map((_, index) => (index === 0 ? first : other) - 6)
    const heightPt = Math.max(...cells.map((cell, index) => textHeightPt(paper, cell, widths[index]!, style)))
    needRoom(paper, heightPt + 4)
    cells.forEach((cell, index) => drawText(paper, cell, { xPt: paper.leftPt + (index === 0 ? 0 : first + (index - 1) * other), yPt: paper.yPt + 1, widthPt: widths[index]! },
      { ...style, weight: index === 0 || style.weight === 800 ? style.weight : 800, align: index === 0 ? 'left' : 'right' }))
    paper.yPt += heightPt + 3
    drawRule(paper, paper.yPt)
  }
  write(columns, { sizePt: sizePt * 0.8, weight: 600, colour: GRAPHITE })
  for (const row of rows) write(row, { sizePt, weight: 400 })
  paper.yPt += 5
}
