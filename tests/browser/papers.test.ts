import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { axeFindings, desk, openBrowser, openPage, phone, visit } from '../support/browser'
import { startDemoServer, type DemoServer } from '../support/demo'
import { readPdf } from '../support/pdf'

let server: DemoServer
let browser: Browser
beforeAll(async () => {
  [server, browser] = await Promise.all([startDemoServer(), openBrowser()])
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

test('the landlord prints the hatch card of an attic that is over, keeps a room clear with one tap, the tenant sees it, and it is lifted with a reason', async () => {
  const maren = await server.as('maren')
  const { page, problems, close } = await openPage(browser, { url: server.url, screen: desk, as: maren })
  await visit(page, `/attics/${server.ids.attic}`)
  await page.getByRole('link', { name: 'Hatch card' }).click()
  await page.getByRole('heading', { name: 'Hatch card', level: 1 }).waitFor()
  const shown = await page.getByRole('article').innerText()
  expect(shown).toContain('Add nothing')
  const href = await page.getByRole('link', { name: /PDF, Letter/ }).getAttribute('href')
  const pdf = await readPdf(new Uint8Array(await (await maren.send(href!)).arrayBuffer()))
  expect(pdf.pages).toBe(1)
  for (const words of ['Attic over the flat', '14 Tern Street, upper flat', 'Add nothing', 'Stop adding. Move the heaviest things']) {
    expect(pdf.text.replaceAll(/\s+/g, ' ')).toContain(words)
    expect(shown.replaceAll(/\s+/g, ' ')).toContain(words)
  }

  await visit(page, `/attics/${server.ids.attic}`)
  await page.getByRole('button', { name: 'Keep Bedroom clear' }).click()
  await page.getByRole('heading', { name: 'Keep clear: Bedroom' }).waitFor()
  expect(await axeFindings(page)).toEqual([])
  const notice = new URL(page.url()).pathname

  const tenant = await openPage(browser, { url: server.url, screen: phone, as: await server.as('tomas') })
  await visit(tenant.page, '/my-home')
  await tenant.page.getByRole('note', { name: 'Keep clear: Bedroom' }).getByText('The whole room').waitFor()
  await tenant.page.getByRole('link', { name: 'The notice for Bedroom' }).click()
  await tenant.page.getByRole('heading', { name: 'Keep clear: Bedroom' }).waitFor()
  expect(await tenant.page.getByRole('button', { name: 'Lift the notice' }).count()).toBe(0)

  await page.getByRole('button', { name: 'Lift the notice' }).click()
  await page.getByText('Why may the room be used again? It stands in the record.').first().waitFor()
  await page.getByLabel('Why may the room be used again?').fill('Books are out; looked at from below (invented).')
  await page.getByRole('button', { name: 'Lift the notice' }).click()
  await page.getByText('The notice is lifted.').waitFor()
  await visit(tenant.page, '/my-home')
  await tenant.page.getByRole('heading', { name: 'What may go in the attic' }).waitFor()
  expect(await tenant.page.getByRole('note', { name: 'Keep clear: Bedroom' }).count()).toBe(0)
  await visit(page, `/units/${server.ids.unit}`)
  await page.getByText(/keep-clear notices? w(as|ere) lifted/).waitFor()
  expect((await maren.get(`/api${notice}`)).body).toMatchObject({ liftedReason: 'Books are out; looked at from below (invented).' })
  expect([...problems, ...tenant.problems]).toEqual([])
  await Promise.all([close(), tenant.close()])
}, 120_000)

test('a gauge card printed at the wrong size is refused with words; a sheet filled in on paper becomes a report of its own day', async () => {
  const { page, problems, close } = await openPage(browser, { url: server.url, screen: phone, as: await server.as('maren') })
  await visit(page, '/gauge-card')
  await page.getByLabel('The 100 mm line, in millimetres').check()
  await page.getByLabel('How long is it on your sheet?').fill('94')
  await page.getByRole('button', { name: 'Check the size' }).click()
  await page.getByText(/This card is too small: printed at 94.% of its size/).first().waitFor()
  await page.getByLabel('How long is it on your sheet?').fill('100')
  await page.getByRole('button', { name: 'Check the size' }).click()
  await page.getByText('The card is true to size.').waitFor()

  await visit(page, `/units/${server.ids.unit}/paper-report`)
  await page.getByLabel('Who filled it in?').fill('Greta Invented')
  await page.getByRole('button', { name: 'Enter the report' }).click()
  await page.getByText('On which day was it filled in?').first().waitFor()
  await page.getByLabel('On which day was it filled in?').fill(new Date(Date.now() - 9 * 86_400_000).toISOString().slice(0, 10))
  await page.getByLabel('None of these').first().check()
  await page.getByLabel('Bedroom').first().check()
  await page.getByLabel('A line that wanders').check()
  await page.getByLabel('A bank card goes in, a dime does not').check()
  expect(await axeFindings(page)).toEqual([])
  await page.getByRole('button', { name: 'Enter the report' }).click()
  await page.getByText('Filled in on paper by Greta Invented').waitFor()
  expect(problems).toEqual([])
  await close()
}, 120_000)
