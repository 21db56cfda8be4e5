import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { openBrowser, openPage, screens, visit } from '../support/browser'
import { plantCeilingHome, type CeilingHome } from '../support/ceilingHome'
import { startServer, type TestServer } from '../support/server'
import { newAttic } from '../api/attic/atticInputs'

let server: TestServer
let home: CeilingHome
let browser: Browser
beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), openBrowser()])
  home = await plantCeilingHome(server)
})
afterAll(async () => {
  await browser.close()
  await home.close()
  await server.stop()
})

const LIST = 'name,weight_lb,length_ft,width_ft,across_ft\nSkis,12,5,1,8\nTent,"1,5",2,1,10\nSleds,9,3,2,12\n'

describe.each(screens)('the list of an attic on a %s', (name, screen) => {
  test('grows by carton, scale and file, several change at once, and the tenant signs and confirms', async () => {
    const attic = await newAttic(home, `Attic for the ${name}`)
    await attic.survey()
    const { page, problems, close } = await openPage(browser, { url: server.url, screen, as: home.owner })
    await visit(page, `/attics/${attic.id}/items/new`)
    await page.getByLabel('What is it?').fill('Old books')
    await page.getByRole('button', { name: /Something of my own/ }).click()
    await page.getByText('Is it full of books?').waitFor()
    await page.getByRole('button', { name: 'Yes, count it as books' }).click()
    await page.getByLabel('I weighed it').check()
    await page.getByLabel('I stood on the scale with it').check()
    await page.getByLabel('You with one of them').fill('210')
    await page.getByLabel('You alone').fill('75 kg')
    await page.getByText(/Old books weighs 45\slb; 101\slb was taken before/).waitFor()
    await page.getByRole('button', { name: 'Note it as stored' }).click()
    await page.getByText('Noted. The attic has been judged with it.').waitFor()

    await page.getByRole('link', { name: 'List as a file' }).click()
    await page.getByLabel('CSV file').setInputFiles({ name: 'garage.csv', mimeType: 'text/csv', buffer: Buffer.from(LIST) })
    await page.getByText(/“1,5” is no number/).waitFor()
    expect(await page.getByRole('button', { name: /as stored/ }).count()).toBe(0)
    await page.getByLabel('Leave out the row that is not right').check()
    await page.getByRole('button', { name: 'Note 2 things as stored' }).click()
    await page.getByText('2 things noted as stored. 1 of the list left out.').waitFor()

    await page.getByLabel('Choose Skis').check()
    await page.getByLabel('Choose Sleds').check()
    await page.getByRole('button', { name: 'Tenant’s' }).click()
    await page.getByText('2 things: noted as the tenant’s.').waitFor()
    await page.getByLabel('Choose Sleds').check()
    await page.getByRole('button', { name: 'Take them out' }).click()
    await page.getByRole('button', { name: /Undo/ }).click()
    await page.getByLabel('Choose Sleds').waitFor()
    expect((await attic.read()).items.map(item => [item.name, item.belongsTo]).sort()).toEqual([['Old books', 'landlord'], ['Skis', 'tenant'], ['Sleds', 'tenant']])
    expect(problems).toEqual([])
    await close()

    const tenant = await openPage(browser, { url: server.url, screen, as: home.tenant })
    await visit(tenant.page, `/attics/${attic.id}/terms`)
    await tenant.page.getByLabel('Your name').fill('Tessa Invented')
    await tenant.page.getByRole('button', { name: 'I have read them and agree' }).click()
    await tenant.page.getByText('You have signed these terms').waitFor()
    await visit(tenant.page, `/attics/${attic.id}`)
    await tenant.page.getByRole('button', { name: 'All still here' }).click()
    await tenant.page.getByText('Noted: everything on the list is still here.').waitFor()
    expect(tenant.problems).toEqual([])
    await tenant.close()
  })
})
