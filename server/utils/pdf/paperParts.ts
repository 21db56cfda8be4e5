import { GRAPHITE, INK, MADDER, needRoom, type Paper } from './paper'
import { drawBox, drawHatch, drawRule } from './paperShapes'
import { drawText, textHeightPt, writeText } from './paperText'

/** Title block: what the sheet is, large, and where it belongs, smaller. `roomRightPt` is kept free for a QR code. */
export function drawHead(paper: Paper, { kind, title, place }: { kind: string, title: string, place: string }, roomRightPt = 0) {
  const box = { xPt: paper.leftPt, widthPt: paper.widthPt - roomRightPt }
  let y = drawText(paper, kind, { ...box, yPt: paper.yPt }, { sizePt: 11, weight: 600, colour: GRAPHITE })
  y = drawText(paper, title, { ...box, yPt: y }, { sizePt: 24, weight: 800 })
  paper.yPt = drawText(paper, place, { ...box, yPt: y }, { sizePt: 13 }) + 6
}

/** Hatched bar, heavy outline, one word and what it means: the same as a verdict on the screen. */
export function drawVerdict(paper: Paper, { word, says, isBarred }: { word: string, says: string, isBarred: boolean }, scale = 1) {
  const bar = 26
  const inner = paper.widthPt - bar - 26
  const wordStyle = { sizePt: 28 * scale, weight: 800 as const, colour: isBarred ? MADDER : INK }
  const saysStyle = { sizePt: 15 * scale, weight: 600 as const }
  const heightPt = 16 + textHeightPt(paper, word, inner, wordStyle) + textHeightPt(paper, says, inner, saysStyle)
  const area = { xPt: paper.leftPt, yPt: paper.yPt, widthPt: paper.widthPt, heightPt }
  const strip = { ...area, widthPt: bar }
  if (isBarred) drawHatch(paper, strip, 'cross', { colour: MADDER })
  drawBox(paper, strip, isBarred ? 2.5 : 1.2)
  drawBox(paper, area, isBarred ? 2.5 : 1.2)
  const x = paper.leftPt + bar + 13
  const y = drawText(paper, word, { xPt: x, yPt: area.yPt + 6, widthPt: inner }, wordStyle)
  drawText(paper, says, { xPt: x, yPt: y, widthPt: inner }, saysStyle)
  paper.yPt += heightPt + 9 * scale
}

/** Cautions stand whole, under a heading, with a heavy bar at their left. */
export function drawCautions(paper: Paper, sentences: readonly string[], { heading = 'For your safety', sizePt = 11, urgent = false } = {}) {
  const inset = 14
  const style = { sizePt }
  const headStyle = { sizePt: sizePt + 1, weight: 800 as const, colour: urgent ? MADDER : INK }
  const innerPt = paper.widthPt - inset
  const heightOf = (text: string) => textHeightPt(paper, text, innerPt, style) + 2.5
  needRoom(paper, textHeightPt(paper, heading, innerPt, headStyle) + sentences.reduce((sum, text) => sum + heightOf(text), 0))
  const top = paper.yPt
  let y = drawText(paper, heading, { xPt: paper.leftPt + inset, yPt: top, widthPt: innerPt }, headStyle) + 1
  for (const sentence of sentences) y = drawText(paper, sentence, { xPt: paper.leftPt + inset, yPt: y, widthPt: innerPt }, style) + 2.5
  paper.doc.rect(paper.leftPt, top + 2, 4, y - top - 4).fill(urgent ? MADDER : INK)
  paper.yPt = y + 7
}

export function drawHeading(paper: Paper, text: string, sizePt = 14) {
  needRoom(paper, sizePt * 4)
  writeText(paper, text, { sizePt, weight: 800 }, 2)
}

export function drawDivider(paper: Paper, gapPt = 7) {
  drawRule(paper, paper.yPt)
  paper.yPt += gapPt
}
