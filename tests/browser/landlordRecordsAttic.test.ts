import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { axeFindings, openBrowser, openPage, screens, visit } from '../support/browser'
import { inventOwner } from '../support/client'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
let browser: Browser
beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), openBrowser()])
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe.each(screens)('a landlord on a %s', (_name, screen) => {
  test('goes from nothing to a rated attic, sees a joist go over, and moves the books to the wall', async () => {
    const owner = inventOwner()
    const { page, problems, close } = await openPage(browser, { url: server.url, screen })
    await visit(page, '/sign-up')
    await page.getByLabel('Name of your household or firm').fill(owner.organisationName)
    await page.getByLabel('Your name').fill(owner.name)
    await page.getByLabel('E-mail address').fill(owner.email)
    await page.getByRole('button', { name: 'Mail me a link to begin' }).click()
    const { text } = await server.mail.waitForMessage(owner.email)
    await visit(page, new URL(/http\S+\/begin\/\S+/.exec(text)![0]).pathname)
    await page.getByLabel('Choose a password').fill(owner.password)
    await page.getByRole('button', { name: 'Set up the account' }).click()
    await page.getByRole('heading', { name: 'No homes need a decision' }).waitFor()

    await page.getByRole('link', { name: 'Add a property' }).click()
    await page.getByLabel('Name of the property').fill('1 Plumb Lane')
    const addUnit = page.getByLabel('Add a unit in the same go')
    if (!await addUnit.isChecked()) await addUnit.check()
    await page.getByLabel('Name of the unit').fill('House')
    await page.getByRole('button', { name: 'Bedroom', exact: true }).click()
    expect(await page.getByLabel('Name of room 1').inputValue()).toBe('Bedroom')
    const hasAttic = page.getByLabel('There is an attic above')
    if (!await hasAttic.isChecked()) await hasAttic.check()
    await page.getByLabel('Name of the attic').fill('Loft')
    await page.getByRole('button', { name: 'Add the property' }).click()

    await page.getByRole('heading', { name: '1 Plumb Lane' }).first().waitFor()
    const loft = page.getByRole('link', { name: 'Loft' })
    if (await loft.count() === 0) await page.getByRole('link', { name: 'House' }).first().click()
    await loft.first().click()
    await page.getByRole('link', { name: 'Survey the attic' }).first().click()

    await page.getByLabel('Rafters and ceiling joists').check()
    await page.getByLabel('How do you get in?').selectOption({ label: 'Pull-down ladder' })
    await page.getByLabel('Opening, width').fill('24')
    await page.getByLabel('Opening, length').fill('54')
    await page.getByLabel('Greatest clear height').fill('60')
    await page.getByLabel('Ceiling finish below').selectOption({ label: 'Gypsum board, ½ in' })
    await page.getByLabel('Somebody has looked at the state of the wood').check()
    await page.getByLabel('None of these, I looked').check()
    await page.getByLabel('Size of one joist').selectOption({ label: '2x8' })
    await page.getByLabel('Spacing, middle to middle').fill('16')
    await page.getByLabel('Clear span').fill('12')
    await page.getByLabel('How many joists').fill('13')
    await page.getByLabel('Wood, from the stamp').selectOption({ label: 'Douglas fir-larch (stamp DF or D FIR-L)' })
    await page.getByLabel('Grade, from the stamp').selectOption({ label: 'No. 2' })
    expect(await axeFindings(page)).toEqual([])
    await page.getByRole('button', { name: 'Keep this survey' }).click()

    // IRC R301.5: 20 psf for an attic with limited storage.
    await page.getByRole('heading', { name: 'What it may hold' }).waitFor()
    await page.getByText(/20.psf/).first().waitFor()
    await page.getByText(/There is height and an opening for limited storage/).waitFor()

    await page.getByRole('link', { name: /^Add something/ }).first().click()
    await page.getByLabel('What is it?').fill('carton of books')
    await page.getByRole('button', { name: /Carton of books/ }).first().click()
    await page.getByLabel('How many?').fill('12')
    await page.getByLabel('Length along the joists').fill('2.5')
    await page.getByLabel('Width across the joists').fill('3')
    await page.getByLabel('From the left wall').fill('4.5')
    await page.getByLabel('From joist 1').fill('6')
    await page.getByRole('button', { name: 'Note it as stored' }).click()

    await page.getByRole('heading', { name: 'What is stored' }).waitFor()
    await page.getByText(/^Over/).first().waitFor()
    await page.getByText(/bearing walls or out of the attic/).first().waitFor()
    expect(await axeFindings(page)).toEqual([])

    await page.getByRole('link', { name: 'Load plan' }).first().click()
    await page.getByRole('button', { name: /Carton of books/ }).first().click()
    await page.getByText('Best places for it').waitFor()
    await page.getByRole('button', { name: /^Move to place 1/ }).click()
    await page.getByRole('button', { name: /^Save this move/ }).click()
    await page.getByText(/Saved: the moves? (is|are) in the load history/).first().waitFor()
    expect(await axeFindings(page)).toEqual([])

    await page.getByRole('link', { name: 'Loft' }).first().click()
    await page.getByRole('heading', { name: 'History' }).waitFor()
    expect(await page.getByText(/was moved/).count()).toBeGreaterThan(0)
    expect(problems).toEqual([])
    await close()
  })
})
