import { randomUUID } from 'node:crypto'
import { mkdirSync } from 'node:fs'
import type { Browser, Page } from 'playwright-core'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeFindings, desk, openBrowser, openPage, phone, schemes, sidewaysOverflowPx, visit } from '../support/browser'
import type { Receipt } from '../../shared/types/receipt'
import { addDays } from '../../shared/utils/days'
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
    expect(problems).toEqual([])
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

/** A card of 428 px and a dark band of 30 px: at 5 px a mm, 85.6 mm and 6 mm. */
const bandPhoto = () => sharp(Buffer.from('<svg xmlns="http://www.w3.org/2000/svg" width="640" height="480"><rect width="100%" height="100%" fill="#e8e2d4"/><rect x="60" y="60" width="428" height="120" fill="#b9c4cc"/><rect x="40" y="300" width="560" height="30" fill="#3a3128"/></svg>')).jpeg().toBuffer()

/** Taps a picture point wherever the picture stands now. */
async function tapPhoto(page: Page, xPx: number, yPx: number) {
  const box = (await page.getByRole('application').locator('img').boundingBox())!
  await page.mouse.click(box.x + xPx * box.width / 640, box.y + yPx * box.width / 640)
}

const keep = async (page: Page) => {
  await page.getByRole('button', { name: 'Keep this reading' }).click()
  await page.getByRole('heading', { level: 1, name: 'The reading is kept' }).waitFor()
}

describe('from the first report to a repair', () => {
  let markId = ''
  const readOn = (daysAgo: number, value: number) => home.tenant.post(`/api/marks/${markId}/readings`, { takenOn: addDays(home.today, -daysAgo), method: 'gauge-card', value }, { headers: { 'idempotency-key': randomUUID() } })

  it('the tenant reads by gauge card, in a photo and by coins, and is asked at once about 12 for 1.2', async () => {
    markId = await reportCrack({ widthMm: null, widthMethod: null })
    for (const [i, daysAgo] of [200, 170, 140, 110, 80, 50].entries()) await readOn(daysAgo, 1.2 + i * 0.8)
    const { page, problems, close } = await openPage(browser, { url: server.url, screen: phone, as: home.tenant })
    await visit(page, `/marks/${markId}/reading`)
    await choose(page, 'None of these')
    await choose(page, /^Printed gauge card/)
    await page.getByLabel('On which day?').fill(addDays(home.today, -20))
    await page.getByLabel('Its width now').fill('58')
    await page.getByRole('button', { name: 'No, it is 5.8 mm' }).click()
    await keep(page)
    expect(await home.db.selectFrom('reading').select(['value', 'detail']).where('markId', '=', markId).orderBy('takenOn', 'desc').limit(1).executeTakeFirst()).toMatchObject({ value: 5.8, detail: { wroteFirst: 58 } })

    await visit(page, `/marks/${markId}/reading`)
    await choose(page, 'None of these')
    await choose(page, /^Photo with a scale in it/)
    await page.locator('input[type=file]').last().setInputFiles({ name: 'band.jpg', mimeType: 'image/jpeg', buffer: await bandPhoto() })
    await page.getByText('Tap one end of the scale.').waitFor()
    await page.locator('[role=application][aria-busy=false]').scrollIntoViewIfNeeded()
    for (const [x, y] of [[60, 120], [488, 120], [160, 300], [160, 330], [320, 300], [320, 330], [480, 300], [480, 330]] as const) await tapPhoto(page, x, y)
    await page.getByText('at 3 places').waitFor()
    await page.getByRole('application').focus()
    await page.keyboard.press('ArrowDown')
    await look(page, 'reading-photo-phone')
    await isSound(page, 'reading-photo')
    await keep(page)
    const photographed = await home.db.selectFrom('reading').select(['value', 'detail']).where('markId', '=', markId).where('method', '=', 'photo-with-scale').executeTakeFirstOrThrow()
    expect(Math.abs(photographed.value! - 6)).toBeLessThan(0.7)
    expect(photographed.detail).toMatchObject({ photo: { distanceMm: 85.6, widthPx: 640 }, stationsMm: [expect.any(Number), expect.any(Number), expect.any(Number)] })

    await visit(page, `/marks/${markId}/reading`)
    await choose(page, 'None of these')
    await choose(page, /^Coin or card/)
    await page.getByLabel('It is wider than', { exact: true }).selectOption({ label: 'two nickels, 3.9 mm' })
    await keep(page)
    await page.getByRole('link', { name: 'See the mark' }).click()
    await page.getByText(/^Widening about .* a year.*, sure of the direction since/).last().waitFor()
    await page.waitForLoadState('networkidle')
    await isSound(page, 'mark-active-phone')
    expect(problems).toEqual([])
    await close()
  })

  it('the landlord sees it is active, acknowledges the finding, has it repaired, and a new segment begins', async () => {
    const { page, problems, close } = await openPage(browser, { url: server.url, screen: desk, as: home.owner })
    await visit(page, `/marks/${markId}`)
    await page.getByText(/^Widening about .* a year.*, sure of the direction since/).last().waitFor()
    await page.waitForLoadState('networkidle')
    await isSound(page, 'mark-active-desk')
    const finding = await home.db.selectFrom('finding').select('id').where('subjectId', '=', markId).where('rule', '=', 'mark-active').where('clearedAt', 'is', null).executeTakeFirstOrThrow()
    await visit(page, `/findings/${finding.id}`)
    const reason = page.getByLabel('Why can it wait?')
    if (!await reason.isVisible()) await page.locator('summary', { hasText: 'cknowledge' }).click()
    await reason.fill('The plasterer comes on Friday')
    await page.getByLabel('Look again on').fill(addDays(home.today, 5))
    await page.getByRole('button', { name: 'Let it rest until then' }).click()
    await expect.poll(() => home.db.selectFrom('finding').select('acknowledgedReason').where('id', '=', finding.id).executeTakeFirst()).toEqual({ acknowledgedReason: 'The plasterer comes on Friday' })
    await visit(page, `/marks/${markId}`)
    await page.getByText('Repaired, closed or back again').click()
    await page.getByLabel(/Why, in a few words/).fill('Filled and painted')
    await page.getByRole('button', { name: 'Keep this', exact: true }).click()
    await page.getByText('readings start anew. What was there before').waitFor()
    await page.getByText('“Filled and painted”').waitFor()
    await isSound(page, 'mark-repaired')
    expect(await home.db.selectFrom('mark').select(['state', 'segment', 'activity']).where('id', '=', markId).executeTakeFirst()).toEqual({ state: 'repaired', segment: 2, activity: 'too-few-readings' })
    expect(await home.db.selectFrom('finding').select('id').where('subjectId', '=', markId).where('rule', '=', 'mark-active').where('clearedAt', 'is', null).execute()).toEqual([])
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

  it('join a mark that was reported twice, undo it, rename one, and move a pin by keys', async () => {
    const [twinId, keptId] = [await reportCrack({ roomId: home.hallId }), await reportCrack({ roomId: home.hallId })]
    const { number } = await home.db.selectFrom('mark').select('number').where('id', '=', keptId).executeTakeFirstOrThrow()
    const { page, problems, close } = await openPage(browser, { url: server.url, screen: desk, as: home.owner })
    await visit(page, `/marks/${twinId}`)
    await page.getByText('It is the same as another mark').click()
    await page.getByRole('radio', { name: new RegExp(`^${number}: Crack, Hall`) }).check()
    await page.locator('form', { hasText: 'Which mark is it part of?' }).getByLabel(/Why, in a few words/).fill('The same crack')
    await page.getByRole('button', { name: 'Join them' }).click()
    await page.getByText(`Joined into mark ${number}`).waitFor()
    await isSound(page, 'mark-joined')
    await page.getByRole('button', { name: 'Undo the joining' }).click()
    await page.getByText('Undone. Each has its own').waitFor()
    await page.getByText('It is the same as another mark').waitFor()
    await page.getByText('Change name, room, place or notes').click()
    await page.getByLabel('Name of the mark', { exact: true }).fill('Crack by the lamp')
    await page.getByRole('button', { name: 'Keep these facts' }).click()
    await page.getByRole('heading', { level: 1, name: 'Crack by the lamp' }).waitFor()

    await page.getByRole('link', { name: 'All ceilings of this home' }).click()
    const hall = page.getByRole('region', { name: 'Hall' })
    await hall.getByRole('button', { name: /Crack by the lamp/ }).click()
    await hall.getByRole('button', { name: 'Move its pin' }).click()
    await hall.getByRole('button', { name: /^Your pin/ }).press('ArrowRight')
    await hall.getByRole('button', { name: 'Keep the pin here' }).click()
    await page.getByRole('button', { name: /^Undo/ }).waitFor()
    await isSound(page, 'unit-ceilings')
    expect(await home.db.selectFrom('mark').select(['pinX', 'pinY']).where('id', '=', twinId).executeTakeFirst()).toEqual({ pinX: 0.35, pinY: 0.2 })
    expect(problems).toEqual([])
    await close()
  })
})
