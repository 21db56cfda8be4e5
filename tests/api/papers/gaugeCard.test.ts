import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { gaugeCardPdf } from '../../../server/utils/papers/gaugeCard'
import { COARSE_LINES_MM, FINE_LINES_MM, placeLines } from '../../../shared/utils/papers/gaugeCard'
import { GAUGE_NEVER } from '../../../shared/utils/messages/gaugeCardMessages'
import { paperFonts } from '../../support/paperFonts'
import { readPdf, renderPdf } from '../../support/pdf'
import { openServer, type OpenHome, type OpenServer, type Refusal } from '../review/openHome'

const PT_PER_MM = 72 / 25.4
const SHEETS = [['letter', 612], ['a4', 595.28]] as const

describe('a gauge card as it comes out of the printer', () => {
  // Measured on the picture an outside program makes of it, at 600 dots an inch.
  it.each(SHEETS)('on %s every line has its width and the check lines their length', async (size, sheetPt) => {
    const [page] = await renderPdf(await gaugeCardPdf({ size, url: 'https://homes.example/gauge-card', madeAt: new Date('2027-05-02') }, paperFonts), 600)
    const leftPt = (sheetPt - 170 * PT_PER_MM) / 2
    const edgePt = findCardTop(page!.isDark, leftPt)
    const widths = (yPt: number) => darkRuns(page!.isDark, yPt, leftPt + 4, leftPt + 170 * PT_PER_MM - 4)
    const fine = widths(edgePt + 20)
    const coarse = widths(edgePt + 74 * PT_PER_MM - 20)
    expect(fine).toHaveLength(FINE_LINES_MM.length)
    fine.forEach(({ widthMm, middlePt }, index) => {
      expect(Math.abs(widthMm - FINE_LINES_MM[index]!)).toBeLessThan(0.09)
      expect((middlePt - leftPt) / PT_PER_MM).toBeCloseTo(placeLines(FINE_LINES_MM, 170)[index]!.middleMm, 0)
    })
    expect(coarse.map(({ widthMm }) => Math.round(widthMm * 10) / 10)).toEqual([...COARSE_LINES_MM])
    const middlePt = edgePt + 37 * PT_PER_MM
    const longest = (yPt: number) => Math.max(...Array.from({ length: 9 }, (_, step) => Math.max(0, ...widths(yPt - 1 + step * 0.25).map(run => run.widthMm))))
    expect(Math.abs(longest(middlePt - 9) - 100)).toBeLessThan(0.4)
    expect(Math.abs(longest(middlePt + 24) - 101.6)).toBeLessThan(0.4)
  })
})

/** The dashed edge of the card is the first row that is dark again and again across its width, below the words. */
function findCardTop(isDark: (xPt: number, yPt: number) => boolean, leftPt: number): number {
  for (let yPt = 150; yPt < 500; yPt += 0.1) {
    const hits = Array.from({ length: 480 }, (_, x) => isDark(leftPt + x, yPt)).filter(Boolean).length
    const edges = Array.from({ length: 120 }, (_, x) => isDark(leftPt - 24 + x * 0.15, yPt)).filter(Boolean).length
    if (hits > 200 && edges === 0) return yPt
  }
  throw new Error('There is no card on the sheet.')
}

function darkRuns(isDark: (xPt: number, yPt: number) => boolean, yPt: number, fromPt: number, toPt: number) {
  const step = 72 / 600
  const runs: { widthMm: number, middlePt: number }[] = []
  let start: number | undefined
  for (let x = fromPt; x <= toPt; x += step) {
    const dark = isDark(x, yPt)
    if (dark && start === undefined) start = x
    if (!dark && start !== undefined) {
      runs.push({ widthMm: (x - start) / PT_PER_MM, middlePt: (x + start) / 2 })
      start = undefined
    }
  }
  return runs
}

describe('the gauge card’s route', () => {
  let open: OpenServer
  let home: OpenHome
  beforeAll(async () => {
    open = await openServer()
    home = await open.openHome()
  })
  afterAll(() => open.close())

  it.each(SHEETS)('prints one page on %s with the warning never to climb or stand under a sag', async (size, sheetPt) => {
    const response = await home.as.tenant.send(`/papers/gauge-card.pdf?paper=${size}`)
    const pdf = await readPdf(new Uint8Array(await response.arrayBuffer()))
    expect([response.status, pdf.pages]).toEqual([200, 1])
    expect(pdf.widthPt).toBeCloseTo(sheetPt, 1)
    expect(pdf.text.replaceAll(/\s+/g, ' ')).toContain(GAUGE_NEVER)
  })

  it('is for everybody with an account, and for nobody else', async () => {
    expect((await home.as.trades.send('/papers/gauge-card.pdf')).status).toBe(200)
    const { status, body } = await home.as.nobody.get<Refusal>('/papers/gauge-card.pdf')
    expect([status, body.data.code]).toEqual([401, 'not-signed-in'])
    expect((await home.as.tenant.get<Refusal>('/papers/gauge-card.pdf?paper=a5')).body.data.code).toBe('unsound-input')
  })
})
