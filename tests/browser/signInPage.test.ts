import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { axeFindings, openBrowser, openPage, schemes, screens, sidewaysOverflowPx, visit } from '../support/browser'
import { signUp } from '../support/client'
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

test.each(screens.flatMap(([name, screen]) => schemes.map(scheme => [name, scheme, screen] as const)))('on a %s in the %s scheme, the sign-in page is clean and fits', async (_name, scheme, screen) => {
  const { page, problems, close } = await openPage(browser, { url: server.url, screen, scheme })
  expect((await visit(page, '/sign-in'))?.status()).toBe(200)
  expect(await axeFindings(page)).toEqual([])
  expect(await sidewaysOverflowPx(page)).toBe(0)
  expect(problems).toEqual([])
  await close()
})

test('a session begun by request is known to the browser', async () => {
  const { client, owner } = await signUp(server.url)
  const { context, close } = await openPage(browser, { url: server.url, as: client })
  const answer = await context.request.get('/api/me')
  expect(answer.status()).toBe(200)
  expect(JSON.stringify(await answer.json())).toContain(owner.email)
  await close()
})
