import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { nowInstant } from '../../../server/utils/clock'
import { qrSquares } from '../../../server/utils/pdf/paperQr'
import { ESTIMATE_CAVEAT, TRUSS_CAUTION } from '../../../shared/utils/messages/safety'
import type { Client } from '../../support/client'
import { readPdf, renderPdf } from '../../support/pdf'
import { bringEngineer, expectGuarded, expectUnsound } from '../homes/guarded'
import { addItem, addSurvey, soundSurvey } from '../review/inventHome'
import { openServer, type OpenHome, type OpenServer } from '../review/openHome'

let open: OpenServer
let home: OpenHome
let path: string
const APP_URL = 'https://homes.example'

beforeAll(async () => {
  open = await openServer({ APP_URL })
  home = await open.openHome()
  await open.db.updateTable('organisation').set({ contactPhone: '+1 555 0134' }).where('id', '=', home.organisationId).execute()
  await addSurvey(open.db, home)
  path = `/papers/attics/${home.atticId}/hatch-card.pdf`
})
afterAll(() => open.close())

async function print(client: Client, paper?: string) {
  const response = await client.send(paper ? `${path}?paper=${paper}` : path)
  expect(response.status).toBe(200)
  return { headers: response.headers, bytes: new Uint8Array(await response.arrayBuffer()) }
}

/** Words of a sentence may stand on several lines. */
const flat = (text: string) => text.replaceAll(/\s+/g, ' ')

describe('a printed hatch card', () => {
  it.each([['letter', 612, 792], ['a4', 595.28, 841.89]] as const)('on %s is one page of text that can be selected, with rating, boxes, cautions and whom to ask', async (size, widthPt, heightPt) => {
    const { headers, bytes } = await print(home.as.owner, size)
    expect(headers.get('content-type')).toBe('application/pdf')
    expect(headers.get('content-disposition')).toBe('inline; filename="hatch-card-loft.pdf"')
    expect(headers.get('cache-control')).toBe('private, no-store')
    const pdf = await readPdf(bytes)
    expect(pdf.pages).toBe(1)
    expect(pdf.widthPt).toBeCloseTo(widthPt, 1)
    expect(pdf.heightPt).toBeCloseTo(heightPt, 1)
    for (const words of ['Loft', '4 Alder Row, Upstairs', 'Light things only', 'At most 20 psf, spread out.', 'Heaviest single box', '45 lb', '12 ft from bearing wall to bearing wall', 'Plumbline Homes, +1 555 0134', ESTIMATE_CAVEAT]) {
      expect(flat(pdf.text)).toContain(words)
    }
  })

  it('carries a QR code of the attic’s page, square for square, and the drawing of its joists', async () => {
    const { bytes } = await print(home.as.manager, 'letter')
    const [page] = await renderPdf(bytes, 216)
    const squares = qrSquares(`${APP_URL}/attics/${home.atticId}`)
    const side = 92
    const left = 612 - 14 / 25.4 * 72 - side
    const top = 14 / 25.4 * 72 - 8
    const cell = side / (squares.length + 8)
    const read = squares.map((row, y) => row.map((_, x) => page!.isDark(left + (x + 4.5) * cell, top + (y + 4.5) * cell)))
    expect(read).toEqual(squares)
    const drawn = Array.from({ length: 40 }, (_, step) => page!.darkShare({ xPt: left - 300, yPt: 190 + step * 6, widthPt: 120, heightPt: 3 }))
    expect(Math.max(...drawn)).toBeGreaterThan(0.1)
  })

  it('follows the asker’s own units and sheet', async () => {
    await open.db.updateTable('appUser').set({ unitsOfMeasure: 'metric' }).where('id', '=', home.tenant).execute()
    const pdf = await readPdf((await print(home.as.tenant)).bytes)
    expect(pdf.widthPt).toBeCloseTo(595.28, 1)
    expect(flat(pdf.text)).toContain('At most 0.96 kPa, spread out.')
    expect(pdf.text).not.toMatch(/\d lb/)
  })

  it('may be printed by the engineer of the home; others are refused as everywhere', async () => {
    await print(await bringEngineer(open.db, open.server.url, home))
    await expectGuarded(home, { method: 'get', path }, 'allowed')
    await expectUnsound(home.as.owner, { method: 'get', path: `${path}?paper=a3` }, 'paper')
    expect((await home.as.owner.get('/papers/attics/nonsense/hatch-card.pdf')).status).toBe(404)
  })

  it('bars everything when the attic is over, and on trusses, whatever was measured', async () => {
    const item = await addItem(open.db, home, 20_000)
    expect(flat((await readPdf((await print(home.as.owner)).bytes)).text)).toContain('Add nothing')
    await open.db.updateTable('atticItem').set({ removedOn: nowInstant().slice(0, 10) }).where('id', '=', item).execute()
    await addSurvey(open.db, home, soundSurvey({ framing: 'trusses' }))
    const { text } = await readPdf((await print(home.as.owner)).bytes)
    expect(flat(text)).toContain('No storage Put nothing up here. These are trusses.')
    expect(flat(text)).toContain(TRUSS_CAUTION)
    expect(text).not.toContain('Heaviest single box')
  })
})
