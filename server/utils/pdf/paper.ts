import PDFDocument from 'pdfkit'
import type { PaperSize } from '../../../shared/types/paper'
import type { PaperFonts } from './paperFonts'
import { drawText } from './paperText'

/** Points of 1/72 in. */
export const PT_PER_MM = 72 / 25.4
const SHEETS: Record<PaperSize, { widthPt: number, heightPt: number }> = {
  letter: { widthPt: 612, heightPt: 792 },
  a4: { widthPt: 210 * PT_PER_MM, heightPt: 297 * PT_PER_MM },
}
/** Most printers leave the outer 6 mm white. */
const MARGIN_PT = 14 * PT_PER_MM
const FOOT_PT = 26

/** The print colours of assets/css/print.css. */
export const INK = '#1e282d'
export const GRAPHITE = '#3c3c3c'
export const RULE = '#96968f'
export const MADDER = '#82140c'

/** A sheet being drawn: its frame, and how far down it is filled. */
export interface Paper {
  doc: PDFKit.PDFDocument
  leftPt: number
  rightPt: number
  topPt: number
  bottomPt: number
  widthPt: number
  yPt: number
}

export interface PaperOptions { size: PaperSize, fonts: PaperFonts, title: string, madeAt: Date }

export function openPaper({ size, fonts, title, madeAt }: PaperOptions): Paper {
  const { widthPt, heightPt } = SHEETS[size]
  const doc = new PDFDocument({
    size: [widthPt, heightPt], margin: 0, bufferPages: true, lang: 'en-US', displayTitle: true, font: undefined,
    info: { Title: title, Producer: 'Lathkey', Creator: 'Lathkey', CreationDate: madeAt },
  })
  for (const [file, bytes] of fonts) doc.registerFont(file, Buffer.from(bytes))
  return {
    doc, leftPt: MARGIN_PT, rightPt: widthPt - MARGIN_PT, topPt: MARGIN_PT, bottomPt: heightPt - MARGIN_PT - FOOT_PT,
    widthPt: widthPt - 2 * MARGIN_PT, yPt: MARGIN_PT,
  }
}

export function nextPage(paper: Paper) {
  paper.doc.addPage()
  paper.yPt = paper.topPt
}

/** Begins a new page where what comes next would not fit on this one. */
export function needRoom(paper: Paper, heightPt: number) {
  if (paper.yPt + heightPt > paper.bottomPt) nextPage(paper)
}

/** Writes the foot of every page and answers the finished document. */
export async function finishPaper(paper: Paper, foot: string): Promise<Buffer> {
  const { doc } = paper
  const { count } = doc.bufferedPageRange()
  for (let page = 0; page < count; page += 1) {
    doc.switchToPage(page)
    const y = paper.bottomPt + 8
    doc.moveTo(paper.leftPt, y).lineTo(paper.rightPt, y).lineWidth(0.6).stroke(RULE)
    const text = count > 1 ? `${foot} · page ${page + 1} of ${count}` : foot
    drawText(paper, text, { xPt: paper.leftPt, yPt: y + 4, widthPt: paper.widthPt }, { sizePt: 8.5, colour: GRAPHITE })
  }
  const parts: Buffer[] = []
  const ended = new Promise<void>((resolve, reject) => doc.on('data', (part: Buffer) => parts.push(part)).on('end', resolve).on('error', reject))
  doc.end()
  await ended
  return Buffer.concat(parts)
}
