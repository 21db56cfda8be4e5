import { randomUUID } from 'node:crypto'
import { mkdirSync } from 'node:fs'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeFindings, desk, openBrowser, openPage, phone, schemes, sidewaysOverflowPx, visit } from '../support/browser'
import type { Receipt } from '../../shared/types/receipt'
import { drawnPhoto, plantCeilingHome, type CeilingHome } from '../support/ceilingHome'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
let home: CeilingHome
let browser: Browser
beforeAll(async () => {
  server = await startServer()
  home = await plantCeilingHome(server)
  await home.db.updateTable('organisation').set({ contactPhone: '+1 555 0100' }).where('id', '=', home.organisationId).execute()
  browser = await openBrowser()
})
afterAll(async () => {
  await browser?.close()
  await home?.close()
  await server?.stop()
})

/** Set to a folder to look at what the tests saw. */
const shots = process.env.LATHKEY_SCREENSHOTS
async function look(page: Page, name: string) {
  if (!shots) return
  mkdirSync(shots, { recursive: true })
  await page.screenshot({ path: `${shots}/${name}.png`, fullPage: true })
}

async function isSound(page: Page, name: string) {
  await look(page, name)
  expect(await axeFindings(page), name).toEqual([])
  expect(await sidewaysOverflowPx(page), name).toBe(0)
}

const choose = (page: Page, label: string | RegExp) => page.getByLabel(label).check()

async function reportCrack(more: object = {}): Promise<string> {
  const { body } = await home.tenant.post<Receipt>(`/api/units/${home.unitId}/observations`, { kind: 'crack', roomId: home.bedroomId, widthMm: 1, widthMethod: 'ruler', shape: 'wandering-line', pin: { xShare: 0.3, yShare: 0.2 }, ...more }, { headers: { 'idempotency-key': randomUUID() } })
  return body.mark.id
}

describe('a tenant on a phone', () => {
  it('takes the reading a reminder asked for, is asked about an unlikely number, and sees the mark', async () => {
    const markId = await reportCrack()
    const { page, problems, close } = await openPage(browser, { url: server.url, screen: phone, as: home.tenant })
    await visit(page, `/marks/${markId}/reading`)
    await isSound(page, 'reading')
    await choose(page, 'None of these')
    await choose(page, /^Ruler/)
    await page.getByLabel('Its width now').fill('12')
    await page.locator('input[type=file]').last().setInputFiles({ name: 'close.jpg', mimeType: 'image/jpeg', buffer: await drawnPhoto(2) })
    await page.getByText('Received').waitFor()
    await page.getByRole('button', { name: 'Keep this reading' }).click()
    await page.getByText('Is that number right?').waitFor()
    await isSound(page, 'reading-ask-again')
    await page.getByLabel('Its width now').fill('1.2')
    await page.getByRole('button', { name: 'Keep this reading' }).click()
    await page.getByRole('heading', { level: 1, name: 'The reading is kept' }).waitFor()
    await isSound(page, 'reading-kept')
    expect(await home.db.selectFrom('photo').select('view').where('markId', '=', markId).where('readingId', 'is not', null).execute()).toEqual([{ view: 'close' }])
    await page.getByRole('link', { name: 'See the mark' }).click()
    await page.getByRole('heading', { level: 1, name: 'Crack, Bedroom' }).waitFor()
    await page.waitForLoadState('networkidle')
    await isSound(page, 'mark-phone')
    expect(problems.filter(problem => !problem.includes('422'))).toEqual([])
    await close()
  })

  it('may say that it could not be measured, and is told to leave when there is danger', async () => {
    const markId = await reportCrack({ roomId: home.hallId })
    const { page, problems, close } = await openPage(browser, { url: server.url, screen: phone, scheme: 'dark', as: home.tenant })
    await visit(page, `/marks/${markId}/reading`)
    await choose(page, 'Bits or plaster are falling')
    await page.getByText('Leave that room now').waitFor()
    expect(await page.getByRole('link', { name: /Call the landlord/ }).getAttribute('href')).toBe('tel:+15550100')
    await choose(page, /It could not be measured/)
    await page.getByRole('button', { name: 'Keep this reading' }).click()
    await page.getByRole('link', { name: 'What was in the way? A few words are enough.' }).waitFor()
    await page.getByLabel('What was in the way?').fill('Left the room')
    await isSound(page, 'reading-danger-dark')
    await page.getByRole('button', { name: 'Keep this reading' }).click()
    await page.getByRole('heading', { level: 1, name: 'The reading is kept' }).waitFor()
    await page.getByRole('link', { name: /Your report R-/ }).waitFor()
    await isSound(page, 'reading-kept-danger-dark')
    expect(problems).toEqual([])
    await close()
  })
})

describe('those who run the home', () => {
  it.each(schemes)('find the mark from the list and settle what was reported, %s', async (scheme) => {
    const { page, problems, close } = await openPage(browser, { url: server.url, screen: desk, scheme, as: home.owner })
    await visit(page, '/ceilings')
    await isSound(page, `ceilings-${scheme}`)
    await page.getByRole('link', { name: /Crack, Bedroom/ }).first().click()
    await page.getByRole('heading', { level: 1, name: 'Crack, Bedroom' }).waitFor()
    await page.waitForLoadState('networkidle')
    await isSound(page, `mark-desk-${scheme}`)
    await page.getByRole('link', { name: /^Report R-/ }).first().click()
    await page.getByRole('heading', { level: 1, name: /^Report R-/ }).waitFor()
    await isSound(page, `report-desk-${scheme}`)
    expect(problems).toEqual([])
    await close()
  })

  it('repair and rename a mark', async () => {
    const { page, problems, close } = await openPage(browser, { url: server.url, screen: desk, as: home.owner })
    const { id } = await home.db.selectFrom('mark').select('id').where('unitId', '=', home.unitId).where('kind', '=', 'crack').executeTakeFirstOrThrow()
    await visit(page, `/marks/${id}`)
    await page.getByText('Repaired, closed or back again').click()
    await page.getByLabel(/Why, in a few words/).fill('Filled and painted')
    await page.getByRole('button', { name: 'Keep this', exact: true }).click()
    await page.getByText('readings start anew. What was there before').waitFor()
    await page.getByText('Change name, room, place or notes').click()
    await page.getByLabel('Name of the mark').fill('Crack by the lamp')
    await page.getByRole('button', { name: 'Keep these facts' }).click()
    await page.getByRole('heading', { level: 1, name: 'Crack by the lamp' }).waitFor()
    await isSound(page, 'mark-repaired')
    expect(problems).toEqual([])
    await close()
  })
})
