import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { openBrowser, openPage, screens, visit } from '../support/browser'
import { startDemoServer, type DemoServer } from '../support/demo'

let server: DemoServer
let browser: Browser
beforeAll(async () => {
  [server, browser] = await Promise.all([startDemoServer(), openBrowser()])
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe.each(screens)('the owner on a %s', (_name, screen) => {
  test('sees first what could hurt somebody, is at the home in one click and at its record in two', async () => {
    const { page, problems, close } = await openPage(browser, { url: server.url, screen, as: await server.as('maren') })
    await visit(page, '/overview')
    const homes = page.getByRole('main').getByRole('listitem').getByRole('heading')
    expect(await homes.first().innerText()).toContain('8 Ferry Lane')
    await page.getByText('Danger sign reported').first().waitFor()
    await homes.getByRole('link', { name: '14 Tern Street, upper flat' }).click()
    await page.getByRole('heading', { level: 1, name: '14 Tern Street, upper flat' }).waitFor()
    await page.getByText(/joist \d+ carries/).first().waitFor()
    await page.getByRole('link', { name: /\d+ entries/ }).first().click()
    await page.getByText('Unbroken').first().waitFor()
    expect(problems).toEqual([])
    await close()
  })

  test('runs a review by hand; nobody gets a second digest that day', async () => {
    const { page, problems, close } = await openPage(browser, { url: server.url, screen, as: await server.as('maren') })
    await visit(page, '/settings/reviews')
    await page.getByRole('button', { name: 'Run a review now' }).click()
    await page.getByText(/The review is done/).first().waitFor({ timeout: 60_000 })
    const digest = await server.mail.waitForMessage('maren@quillbrook.example', { subject: /needs? you/ })
    const link = /https?:\/\/[^\s"<>]+\/(?:findings|marks|attics|jobs|units)\/[^\s"<>]+/.exec(digest.text)?.[0]
    expect(link).toBeDefined()
    const answer = await page.goto(new URL(link!).pathname)
    expect(answer?.status()).toBe(200)
    expect(server.mail.messagesTo('maren@quillbrook.example').filter(mail => /needs? you/.test(mail.subject))).toHaveLength(1)
    expect(problems).toEqual([])
    await close()
  })
})
