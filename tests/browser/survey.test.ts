import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { axeFindings, openBrowser, openPage, screens, sidewaysOverflowPx, visit } from '../support/browser'
import type { Client } from '../support/client'
import { startDemoServer, type DemoServer } from '../support/demo'

let server: DemoServer
let browser: Browser
let maren: Client
beforeAll(async () => {
  [server, browser] = await Promise.all([startDemoServer(), openBrowser()])
  maren = await server.as('maren')
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe.each(screens)('a survey on a %s', (_name, screen) => {
  test('says what each open answer does, explains its words, keeps its draft, and refuses at the field', async () => {
    const { page, problems, close } = await openPage(browser, { url: server.url, screen, as: maren })
    await visit(page, `/attics/${server.ids.attic}/survey`)
    const soFar = page.getByRole('region', { name: 'What these answers give' })
    await soFar.getByText(/psf/).first().waitFor()

    // IRC Table R301.5: without 42 in of clear height there is no storage.
    await page.getByLabel('Greatest clear height').fill('')
    await soFar.getByText('The clear height is not known', { exact: false }).waitFor()
    expect(await soFar.locator('[aria-live]').innerText()).toMatch(/^0.psf/)
    await soFar.getByText(/Open answers and what each does/).click()
    await soFar.getByText(/The clear height is not measured.*At best the rating becomes \d/).waitFor()

    await page.getByRole('link', { name: 'How to measure the clear height' }).click()
    await page.getByRole('heading', { name: 'Know your roof' }).waitFor()
    expect(new URL(page.url()).hash).toBe('#clear-height')
    expect(await page.getByRole('img', { name: /a measure upright from the top of the joists/ }).isVisible()).toBe(true)
    await page.goBack()
    await page.getByText('Your draft was kept on this device').waitFor()
    expect(await page.getByLabel('Greatest clear height').inputValue()).toBe('')
    await page.getByLabel('Greatest clear height').fill('1.6 m')
    await soFar.getByText('The clear height is not known', { exact: false }).waitFor({ state: 'detached' })

    await page.locator('input[name="joistFields.0.bothEndsBear"][value="unknown"]').check()
    await soFar.getByText(/both ends of the joists lie on bearing walls/).waitFor()
    await page.locator('input[name="joistFields.0.bothEndsBear"][value="yes"]').check()

    await page.getByLabel('Wood, from the stamp').selectOption({ label: 'Southern pine (stamp SP or SYP)' })
    await page.getByRole('group', { name: 'Was it put in before June 2013?' }).getByLabel('Yes').check()
    await page.getByLabel('A stamp and a dated paper prove it').check()

    const strongbacks = page.getByText(/Strongbacks \(\d/)
    if (!await page.getByRole('button', { name: 'Add a strongback' }).isVisible()) await strongbacks.click()
    await page.getByRole('button', { name: 'Add a strongback' }).click()
    const place = page.getByLabel(/^Strongback \d, from the wall/).last()
    // The middle of the span of 12 ft is offered.
    expect(await place.inputValue()).toBe('6')
    await place.fill('30')
    await page.getByRole('button', { name: 'Keep this survey' }).click()
    await page.getByText('The strongback must lie between the two walls.').first().waitFor()
    expect(await axeFindings(page)).toEqual([])
    expect(await sidewaysOverflowPx(page)).toBe(0)
    await place.fill('5 ft 6 in')
    await page.getByRole('button', { name: 'Keep this survey' }).click()

    await page.getByText('The survey is kept. The attic has been judged by it.').waitFor()
    const { survey } = (await maren.get<{ survey: { clearHeightIn: number, joistFields: object[] } }>(`/api/attics/${server.ids.attic}`)).body
    expect(survey.clearHeightIn).toBeCloseTo(62.99, 2)
    expect(survey.joistFields).toMatchObject([{ bothEndsBear: true, species: 'Southern pine', installedBeforeJune2013: true, preJune2013StampProven: true, strongbacks: expect.arrayContaining([expect.objectContaining({ atFt: 5.5, engineerAccepts: false })]) }])
    expect(problems).toEqual([])
    await close()
  })
})
