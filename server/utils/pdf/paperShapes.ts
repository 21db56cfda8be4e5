import { INK, RULE, type Paper } from './paper'

/** The drawing language on paper: ink lines, ruled hatches, square corners. */

export interface Area { xPt: number, yPt: number, widthPt: number, heightPt: number }

export function drawRule({ doc, leftPt, rightPt }: Paper, yPt: number, colour = RULE, lineWidthPt = 0.8) {
  doc.moveTo(leftPt, yPt).lineTo(rightPt, yPt).lineWidth(lineWidthPt).stroke(colour)
}

export function drawBox({ doc }: Paper, { xPt, yPt, widthPt, heightPt }: Area, lineWidthPt = 1, colour = INK) {
  doc.rect(xPt, yPt, widthPt, heightPt).lineWidth(lineWidthPt).stroke(colour)
}

/** single = near, cross = over or barred, ruled = a zone without a verdict. */
export function drawHatch({ doc }: Paper, { xPt, yPt, widthPt, heightPt }: Area, hatch: 'single' | 'cross' | 'ruled', { stepPt = 5, colour = INK } = {}) {
  doc.save().rect(xPt, yPt, widthPt, heightPt).clip()
  for (let offset = -heightPt; offset < widthPt; offset += stepPt) {
    if (hatch === 'ruled') doc.moveTo(xPt + offset + heightPt, yPt).lineTo(xPt + offset + heightPt, yPt + heightPt)
    else doc.moveTo(xPt + offset, yPt + heightPt).lineTo(xPt + offset + heightPt, yPt)
    if (hatch === 'cross') doc.moveTo(xPt + offset, yPt).lineTo(xPt + offset + heightPt, yPt + heightPt)
  }
  doc.lineWidth(hatch === 'ruled' ? 0.35 : 0.8).stroke(colour).restore()
}

/** A box to tick, drawn beside the first line of its words. */
export function drawTickBox({ doc }: Paper, xPt: number, yPt: number, sidePt = 10) {
  doc.rect(xPt, yPt, sidePt, sidePt).lineWidth(1).stroke(INK)
}
