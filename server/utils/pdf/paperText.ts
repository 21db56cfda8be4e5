import { INK, type Paper } from './paper'
import { fontFile, textRuns, type PaperWeight, type TextRun } from './paperFonts'

export interface TextStyle { sizePt: number, weight?: PaperWeight, colour?: string, align?: 'left' | 'center' | 'right' }
export interface TextBox { xPt: number, yPt: number, widthPt: number }

const LEADING = 1.32

interface Word { runs: TextRun[], widthPt: number }
interface TextLine { words: Word[], widthPt: number }

const useFont = ({ doc }: Paper, { subset }: TextRun, { sizePt, weight = 400 }: TextStyle) => doc.font(fontFile(subset, weight)).fontSize(sizePt)

const runWidthPt = (paper: Paper, run: TextRun, style: TextStyle) => useFont(paper, run, style).widthOfString(run.text)

function measure(paper: Paper, text: string, style: TextStyle): Word {
  const runs = textRuns(text)
  return { runs, widthPt: runs.reduce((sum, run) => sum + runWidthPt(paper, run, style), 0) }
}

/** A word wider than the column is cut where it no longer fits. */
function pieces(paper: Paper, word: string, widthPt: number, style: TextStyle): Word[] {
  const whole = measure(paper, word, style)
  const letters = Array.from(word)
  if (whole.widthPt <= widthPt || letters.length < 2) return [whole]
  let fits = 1
  while (fits < letters.length - 1 && measure(paper, letters.slice(0, fits + 1).join(''), style).widthPt <= widthPt) fits += 1
  return [measure(paper, letters.slice(0, fits).join(''), style), ...pieces(paper, letters.slice(fits).join(''), widthPt, style)]
}

function linesOf(paper: Paper, text: string, widthPt: number, style: TextStyle): TextLine[] {
  const spacePt = measure(paper, ' ', style).widthPt
  return text.split('\n').flatMap((paragraph) => {
    const lines: TextLine[] = [{ words: [], widthPt: 0 }]
    for (const word of paragraph.split(' ').filter(Boolean).flatMap(part => pieces(paper, part, widthPt, style))) {
      const line = lines.at(-1)!
      const wider = line.widthPt + (line.words.length > 0 ? spacePt : 0) + word.widthPt
      if (line.words.length > 0 && wider > widthPt) lines.push({ words: [word], widthPt: word.widthPt })
      else Object.assign(line, { words: [...line.words, word], widthPt: wider })
    }
    return lines
  })
}

const joined = ({ words }: TextLine) => textRuns(words.map(({ runs }) => runs.map(run => run.text).join('')).join(' '))

/** Writes text into a column, line by line, and answers where it ends. Lines are laid out here because one text may need several fonts. */
export function drawText(paper: Paper, text: string, { xPt, yPt, widthPt }: TextBox, style: TextStyle): number {
  const linePt = style.sizePt * LEADING
  const lines = linesOf(paper, text, widthPt, style)
  lines.forEach((line, index) => {
    const space = widthPt - line.widthPt
    let x = xPt + (style.align === 'center' ? space / 2 : style.align === 'right' ? space : 0)
    for (const run of joined(line)) {
      useFont(paper, run, style).fillColor(style.colour ?? INK).text(run.text, x, yPt + index * linePt, { lineBreak: false })
      x += runWidthPt(paper, run, style)
    }
  })
  return yPt + lines.length * linePt
}

export const textHeightPt = (paper: Paper, text: string, widthPt: number, style: TextStyle) => linesOf(paper, text, widthPt, style).length * style.sizePt * LEADING

/** Across the sheet at its present height, which moves down by it. */
export function writeText(paper: Paper, text: string, style: TextStyle, gapAfterPt = 0) {
  paper.yPt = drawText(paper, text, { xPt: paper.leftPt, yPt: paper.yPt, widthPt: paper.widthPt }, style) + gapAfterPt
}
