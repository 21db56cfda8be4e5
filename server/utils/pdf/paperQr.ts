import QRCode from 'qrcode'
import type { Paper } from './paper'
import { INK } from './paper'

/** The squares of a QR code (ISO/IEC 18004), error correction M: row by row, true = dark. */
export function qrSquares(text: string): boolean[][] {
  const { size, data } = QRCode.create(text, { errorCorrectionLevel: 'M' }).modules
  return Array.from({ length: size }, (_, row) => Array.from({ length: size }, (_, column) => data[row * size + column] === 1))
}

/** Drawn as one filled path of squares, so that it stays sharp at any size. The white edge of four squares is inside `sidePt`. */
export function drawQr({ doc }: Paper, text: string, xPt: number, yPt: number, sidePt: number) {
  const squares = qrSquares(text)
  const quiet = 4
  const cell = sidePt / (squares.length + 2 * quiet)
  squares.forEach((cells, row) => cells.forEach((isDark, column) => {
    if (isDark) doc.rect(xPt + (column + quiet) * cell, yPt + (row + quiet) * cell, cell, cell)
  }))
  doc.fill(INK)
}
