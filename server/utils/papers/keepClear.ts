import type { PaperSize } from '../../../shared/types/paper'
import type { KeepClearText } from '../../../shared/utils/messages/keepClearMessages'
import { GRAPHITE, MADDER, finishPaper, openPaper, type Paper } from '../pdf/paper'
import type { PaperFonts } from '../pdf/paperFonts'
import { drawCautions } from '../pdf/paperParts'
import { drawQr } from '../pdf/paperQr'
import { drawBox, drawHatch } from '../pdf/paperShapes'
import { drawText, writeText } from '../pdf/paperText'

export interface KeepClear {
  size: PaperSize
  home: string
  roomName: string
  url: string
  text: KeepClearText
  /** Set once it has been lifted: the print then says so across its head. */
  lifted: { at: string, by: string, reason: string } | null
  madeAt: Date
}

const BAND_PT = 22
const QR_PT = 96

/** A notice for the door of the room below, to be read from the corridor. */
export async function keepClearPdf(notice: KeepClear, fonts: PaperFonts): Promise<Buffer> {
  const paper = openPaper({ size: notice.size, fonts, title: `${notice.text.word}, ${notice.home}`, madeAt: notice.madeAt })
  if (notice.lifted) drawLifted(paper, notice.lifted)
  else drawBand(paper)
  writeText(paper, notice.lifted ? 'Lifted' : 'Keep clear', { sizePt: 58, weight: 800, colour: notice.lifted ? GRAPHITE : MADDER })
  writeText(paper, notice.roomName, { sizePt: 34, weight: 800 })
  writeText(paper, notice.home, { sizePt: 15, colour: GRAPHITE }, 10)
  drawFacts(paper, notice)
  if (!notice.lifted) drawBand(paper)
  drawCautions(paper, notice.text.cautions, { sizePt: 11.5, urgent: true })
  return finishPaper(paper, `${notice.text.word}. Hangs until it is lifted; the page behind the code says whether it still stands.`)
}

/** Cross hatch from edge to edge: it says "barred" to those who cannot see the colour. */
function drawBand(paper: Paper) {
  const area = { xPt: paper.leftPt, yPt: paper.yPt, widthPt: paper.widthPt, heightPt: BAND_PT }
  drawHatch(paper, area, 'cross', { stepPt: 9, colour: MADDER })
  drawBox(paper, area, 2)
  paper.yPt += BAND_PT + 10
}

function drawLifted(paper: Paper, { at, by, reason }: NonNullable<KeepClear['lifted']>) {
  writeText(paper, `Lifted ${at} by ${by}: ${reason}`, { sizePt: 15, weight: 800 }, 8)
}

function drawFacts(paper: Paper, { text, url }: KeepClear) {
  drawQr(paper, url, paper.rightPt - QR_PT, paper.yPt - 6, QR_PT)
  const bottom = paper.yPt + QR_PT
  for (const [label, words] of [['Keep out of', text.area], ['Why', text.cause], ['Since', text.since], ['Waits for', text.waitingFor], ['Call', text.call]] as const) {
    const box = { xPt: paper.leftPt, yPt: paper.yPt, widthPt: paper.widthPt - QR_PT - 16 }
    const labelEnd = drawText(paper, label, { ...box, widthPt: 82 }, { sizePt: 13, colour: GRAPHITE })
    paper.yPt = Math.max(labelEnd, drawText(paper, words, { ...box, xPt: box.xPt + 86, widthPt: box.widthPt - 86 }, { sizePt: 16, weight: 800 })) + 5
  }
  paper.yPt = Math.max(paper.yPt, bottom) + 8
}
