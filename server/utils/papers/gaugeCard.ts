import type { PaperSize } from '../../../shared/types/paper'
import { GAUGE_CAUTIONS, GAUGE_LIMIT, GAUGE_ON_CARD, GAUGE_STEPS } from '../../../shared/utils/messages/gaugeCardMessages'
import { CHECK_LENGTHS, COARSE_LINES_MM, FINE_LINES_MM, placeLines } from '../../../shared/utils/papers/gaugeCard'
import { GRAPHITE, INK, PT_PER_MM, finishPaper, openPaper, type Paper } from '../pdf/paper'
import type { PaperFonts } from '../pdf/paperFonts'
import { drawCautions, drawHead } from '../pdf/paperParts'
import { drawQr } from '../pdf/paperQr'
import { drawText } from '../pdf/paperText'

export interface GaugeCard { size: PaperSize, url: string, madeAt: Date }

const CARD = { widthMm: 170, heightMm: 74 } as const
/** How far a line reaches in from the edge. */
const LINE_MM = 13
const QR_PT = 84
const MM_PER_IN = 25.4

/** The sheet with the card to cut out. Widths are strokes of exactly that width, so they are true whatever draws them. */
export async function gaugeCardPdf({ size, url, madeAt }: GaugeCard, fonts: PaperFonts): Promise<Buffer> {
  const paper = openPaper({ size, fonts, title: 'Gauge card', madeAt })
  drawHead(paper, { kind: 'To print and cut out', title: 'Gauge card', place: 'For the width of a crack, in millimetres' }, QR_PT + 10)
  drawQr(paper, url, paper.rightPt - QR_PT, paper.topPt - 8, QR_PT)
  paper.yPt += 8
  for (const [index, step] of GAUGE_STEPS.entries()) drawStep(paper, index + 1, step)
  paper.yPt += 8
  drawCard(paper)
  drawCautions(paper, [...GAUGE_CAUTIONS, GAUGE_LIMIT], { sizePt: 11, urgent: true })
  return finishPaper(paper, `Gauge card for ${size === 'a4' ? 'A4' : 'Letter'} paper. Measure both check lines before use; the page behind the code tells whether it was printed true.`)
}

function drawStep(paper: Paper, number: number, words: string) {
  const box = { yPt: paper.yPt, widthPt: 16 }
  drawText(paper, String(number), { ...box, xPt: paper.leftPt }, { sizePt: 12, weight: 800 })
  paper.yPt = drawText(paper, words, { ...box, xPt: paper.leftPt + 20, widthPt: paper.widthPt - 20 }, { sizePt: 12 }) + 2
}

function drawCard(paper: Paper) {
  const left = paper.leftPt + (paper.widthPt - CARD.widthMm * PT_PER_MM) / 2
  const top = paper.yPt
  const bottom = top + CARD.heightMm * PT_PER_MM
  paper.doc.save().rect(left, top, CARD.widthMm * PT_PER_MM, CARD.heightMm * PT_PER_MM).dash(4, { space: 3 }).lineWidth(0.5).stroke(GRAPHITE).restore()
  drawEdge(paper, FINE_LINES_MM, left, top, 1)
  drawEdge(paper, COARSE_LINES_MM, left, bottom, -1)
  const middle = top + (CARD.heightMm / 2) * PT_PER_MM
  drawCheckLine(paper, left + 8 * PT_PER_MM, middle - 9, CHECK_LENGTHS.mm, 10, 'check: 100 mm')
  drawCheckLine(paper, left + 8 * PT_PER_MM, middle + 24, CHECK_LENGTHS.in * MM_PER_IN, MM_PER_IN, 'check: 4 in')
  drawText(paper, GAUGE_ON_CARD, { xPt: left + 120 * PT_PER_MM, yPt: middle - 24, widthPt: 46 * PT_PER_MM }, { sizePt: 10, weight: 600, align: 'right', colour: GRAPHITE })
  paper.yPt = bottom + 14
}

/** `inward` is 1 for the upper edge, −1 for the lower one. */
function drawEdge(paper: Paper, widthsMm: readonly number[], leftPt: number, edgePt: number, inward: 1 | -1) {
  for (const { widthMm, middleMm } of placeLines(widthsMm, CARD.widthMm)) {
    const x = leftPt + middleMm * PT_PER_MM
    const end = edgePt + inward * LINE_MM * PT_PER_MM
    paper.doc.moveTo(x, edgePt).lineTo(x, end).lineCap('butt').lineWidth(widthMm * PT_PER_MM).stroke('#000000')
    drawText(paper, String(widthMm), { xPt: x - 20, yPt: inward === 1 ? end + 1 : end - 16, widthPt: 40 }, { sizePt: 11, weight: 800, align: 'center' })
  }
}

/** A line of known length with a tick at both ends and at every whole step. */
function drawCheckLine({ doc, ...paper }: Paper, xPt: number, yPt: number, lengthMm: number, stepMm: number, label: string) {
  const at = (mm: number) => xPt + mm * PT_PER_MM
  doc.moveTo(xPt, yPt).lineTo(at(lengthMm), yPt).lineWidth(0.6).stroke(INK)
  for (let step = 0; step <= Math.round(lengthMm / stepMm); step += 1) {
    const isEnd = step === 0 || step === Math.round(lengthMm / stepMm)
    doc.moveTo(at(step * stepMm), yPt - (isEnd ? 7 : 3.5)).lineTo(at(step * stepMm), yPt + (isEnd ? 7 : 0)).lineWidth(isEnd ? 0.8 : 0.5).stroke(INK)
  }
  drawText({ doc, ...paper }, label, { xPt: xPt + 4, yPt: yPt + 2, widthPt: 200 }, { sizePt: 10, weight: 600 })
}
