import type { PaperSize } from '../../../shared/types/paper'
import type { HatchCardText } from '../../../shared/utils/messages/hatchCardMessages'
import { drawField } from '../pdf/drawField'
import { GRAPHITE, finishPaper, openPaper, type Paper } from '../pdf/paper'
import type { PaperFonts } from '../pdf/paperFonts'
import { drawCautions, drawHead, drawVerdict } from '../pdf/paperParts'
import { drawQr } from '../pdf/paperQr'
import { drawTable } from '../pdf/paperTable'
import { drawText, writeText } from '../pdf/paperText'

export interface HatchCard { size: PaperSize, attic: string, home: string, url: string, text: HatchCardText, madeAt: Date }

/** Type sizes tried in turn until everything stands on one page. */
const SCALES = [1.45, 1.3, 1.2, 1.12, 1.06, 1, 0.95, 0.9, 0.86, 0.82, 0.78] as const

/** One page for the attic hatch. No caution is ever left out: a long card is set smaller, and at the very worst runs on to a second page. */
export async function hatchCardPdf(card: HatchCard, fonts: PaperFonts): Promise<Buffer> {
  const foot = `${card.text.dates}`
  for (const scale of SCALES) {
    const paper = openPaper({ size: card.size, fonts, title: `Hatch card, ${card.attic}, ${card.home}`, madeAt: card.madeAt })
    drawCard(paper, card, scale)
    const fits = paper.doc.bufferedPageRange().count === 1 && paper.yPt <= paper.bottomPt
    if (fits || scale === SCALES.at(-1)) return finishPaper(paper, foot)
  }
  throw new Error('No type size was tried.')
}

const QR_PT = 92

function drawCard(paper: Paper, { attic, home, url, text }: HatchCard, scale: number) {
  drawHead(paper, { kind: 'Hatch card', title: attic, place: home }, QR_PT + 10)
  drawCorner(paper, url)
  drawVerdict(paper, text, scale)
  for (const sentence of text.why) writeText(paper, sentence, { sizePt: 11 * scale })
  if (text.why.length > 0) paper.yPt += 5 * scale
  drawFields(paper, text, scale)
  if (text.table) drawBoxes(paper, text.table, scale)
  if (text.noTable) writeText(paper, text.noTable, { sizePt: 13 * scale, weight: 600 }, 6)
  drawNever(paper, text, scale)
  drawCautions(paper, text.cautions, { sizePt: 10 * scale, urgent: text.isBarred })
  writeText(paper, text.ask, { sizePt: 14 * scale, weight: 800 })
}

function drawCorner(paper: Paper, url: string) {
  const x = paper.rightPt - QR_PT
  drawQr(paper, url, x, paper.topPt - 8, QR_PT)
  const below = drawText(paper, 'Scan: this attic today', { xPt: x, yPt: paper.topPt + QR_PT - 13, widthPt: QR_PT }, { sizePt: 8.5, colour: GRAPHITE, align: 'center' })
  paper.yPt = Math.max(paper.yPt, below + 4)
}

function drawFields(paper: Paper, { fields, moreFields }: HatchCardText, scale: number) {
  if (fields.length === 0) return
  const gap = 22
  const widthPt = (paper.widthPt - gap * (fields.length - 1)) / fields.length
  const ends = fields.map((field, index) => drawField(paper, field, { xPt: paper.leftPt + index * (widthPt + gap), yPt: paper.yPt, widthPt, heightPt: 92 * scale }, 11 * scale))
  paper.yPt = Math.max(...ends) + 6 * scale
  if (moreFields) writeText(paper, moreFields, { sizePt: 11 * scale }, 6 * scale)
}

function drawBoxes(paper: Paper, { caption, columns, rows, notes }: NonNullable<HatchCardText['table']>, scale: number) {
  writeText(paper, caption, { sizePt: 13 * scale, weight: 800 }, 1)
  drawTable(paper, { columns: ['From the wall', ...columns], rows: rows.map(({ place, weights }) => [place, ...weights]) }, { sizePt: 14 * scale, firstShare: columns.length > 1 ? 0.4 : 0.55 })
  for (const note of notes) writeText(paper, note, { sizePt: 10.5 * scale })
  paper.yPt += 6 * scale
}

function drawNever(paper: Paper, { never }: HatchCardText, scale: number) {
  writeText(paper, 'Never up here', { sizePt: 13 * scale, weight: 800 }, 1)
  const style = { sizePt: 12 * scale }
  const columnPt = paper.widthPt / 2
  const half = Math.ceil(never.length / 2)
  const ends = [never.slice(0, half), never.slice(half)].map((list, column) => list.reduce(
    (y, words) => drawText(paper, `×  ${words}`, { xPt: paper.leftPt + column * columnPt, yPt: y, widthPt: columnPt - 8 }, style), paper.yPt))
  paper.yPt = Math.max(...ends) + 8 * scale
}
