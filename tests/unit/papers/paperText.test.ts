import { describe, expect, it } from 'vitest'
import { openPaper } from '../../../server/utils/pdf/paper'
import { textRuns } from '../../../server/utils/pdf/paperFonts'
import { qrSquares } from '../../../server/utils/pdf/paperQr'
import { drawText, textHeightPt } from '../../../server/utils/pdf/paperText'
import { fileNameOf } from '../../../server/utils/pdf/sendPaper'
import { paperFonts } from '../../support/paperFonts'

const paper = () => openPaper({ size: 'a4', fonts: paperFonts, title: 'Trial', madeAt: new Date('2027-05-02') })

describe('text on paper', () => {
  it('is cut where the alphabet changes, and no letter is lost', () => {
    expect(textRuns('Łukasz of Łódź')).toEqual([
      { subset: 'latin-ext', text: 'Ł' }, { subset: 'latin', text: 'ukasz of ' }, { subset: 'latin-ext', text: 'Ł' }, { subset: 'latin', text: 'ód' }, { subset: 'latin-ext', text: 'ź' },
    ])
    expect(textRuns('Київ')).toEqual([{ subset: 'cyrillic', text: 'Київ' }])
  })

  it('writes out signs the font cannot draw, and marks letters it cannot', () => {
    expect(textRuns('⅝ in').map(run => run.text).join('')).toBe('5/8 in')
    expect(textRuns('天井 3').map(run => run.text).join('')).toBe('?? 3')
  })

  it('breaks at spaces, cuts a word that is wider than its column, and keeps a figure by its unit', () => {
    const style = { sizePt: 12 }
    const one = textHeightPt(paper(), 'Line', 200, style)
    expect(textHeightPt(paper(), 'one two three four five six seven eight nine ten eleven', 100, style)).toBeGreaterThan(2 * one)
    expect(textHeightPt(paper(), 'W'.repeat(60), 100, style)).toBeGreaterThan(5 * one)
    expect(textHeightPt(paper(), 'at most 20\u00A0psf', 60, style)).toBeCloseTo(2 * one)
    expect(drawText(paper(), 'first\nsecond', { xPt: 40, yPt: 100, widthPt: 200 }, style)).toBeCloseTo(100 + 2 * one)
  })
})

describe('a QR code', () => {
  it('is square, with a finder in three corners (ISO/IEC 18004) and not in the fourth', () => {
    const squares = qrSquares('https://homes.example/attics/1')
    const isFinder = (top: number, left: number) => [0, 1, 2, 3, 4, 5, 6].every(step => squares[top]![left + step] && squares[top + 6]![left + step] && squares[top + step]![left])
    const far = squares.length - 7
    expect([isFinder(0, 0), isFinder(0, far), isFinder(far, 0), isFinder(far, far)]).toEqual([true, true, true, false])
  })
})

describe('the file name of a paper', () => {
  it.each([['Hatch card Łoft, 2nd floor', 'hatch-card-oft-2nd-floor'], ['天井', 'paper'], ['Crème "brûlée"\r\nx', 'creme-brulee-x']])('%s becomes %s.pdf', (name, file) => {
    expect(fileNameOf(name)).toBe(file)
  })
})
