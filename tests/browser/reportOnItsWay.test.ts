import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openBrowser, openPage, phone, visit, type OpenPage, type PageOptions } from '../support/browser'
import { plantCeilingHome, type CeilingHome } from '../support/ceilingHome'
import { describeCrack, drawnFile, press, question, skipToSend } from '../support/reportPages'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
let home: CeilingHome
let browser: Browser
beforeAll(async () => {
  server = await startServer()
  home = await plantCeilingHome(server)
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await home.close()
  await server.stop()
})

async function within(options: Omit<PageOptions, 'url'>, work: (opened: OpenPage) => Promise<void>, expected: RegExp = /^$/) {
  const opened = await openPage(browser, { url: server.url, ...options })
  try {
    await work(opened)
    expect(opened.problems.filter(problem => !expected.test(problem))).toEqual([])
  }
  finally { await opened.close() }
}

const openReport = (page: Page) => visit(page, `/report/${home.unitId}`)
const receiptId = (page: Page) => /\/reports\/([\w-]+)/.exec(page.url())?.[1]
const reportsIn = (roomId: string) => home.db.selectFrom('observation').select('id').where('roomId', '=', roomId).orderBy('number').execute()
/** A room no other test reports in. */
async function freshRoom(name: string) {
  const { body } = await home.owner.post<{ id: string }>(`/api/units/${home.unitId}/rooms`, { name })
  return body.id
}

describe('a report on its way', () => {
  it('survives a reload and a lost signal, and is received once', async () => {
    const roomId = await freshRoom('Attic room')
    await within({ screen: phone, as: home.tenant }, async ({ page, context }) => {
      await openReport(page)
      await describeCrack(page, 'Attic room')
      await page.getByText('Saved on this phone').waitFor()
      await visit(page, `/report/${home.unitId}`)
      await question(page, 'Is any of this happening?')
      await page.getByText('Taken up again').waitFor()
      await page.getByRole('checkbox', { name: 'None of these' }).check()
      await press(page, 'Go on')
      await press(page, 'Not sure')
      await press(page, 'Not sure')
      await question(page, 'Can you take two photos?')
      await context.setOffline(true)
      await page.getByLabel(/Take a photo: The whole/).setInputFiles(await drawnFile())
      await page.getByText('Kept on this phone').waitFor()
      await press(page, 'Go on')
      await page.getByText('1 still on this phone').waitFor()
      await press(page, 'Send the report')
      await page.getByText('No connection just now').waitFor()
      expect(await reportsIn(roomId)).toHaveLength(0)
      await context.setOffline(false)
      await question(page, 'Sent. Thank you.')
      const { body } = await home.tenant.get<{ photos: unknown[] }>(`/api/observations/${receiptId(page)}`)
      expect(body.photos).toHaveLength(1)
      expect(await page.evaluate(() => localStorage.getItem('lathkey.report-drafts'))).toBe('{}')
    }, /ERR_INTERNET_DISCONNECTED/)
    expect(await reportsIn(roomId)).toHaveLength(1)
  })

  it('keeps its pictures through a reload without a signal for them', async () => {
    await within({ screen: phone, as: home.tenant }, async ({ page, context }) => {
      await openReport(page)
      await describeCrack(page, 'Hall')
      await context.route('**/photos', route => route.abort())
      await visit(page, `/report/${home.unitId}?q=photos`)
      await page.getByLabel(/Choose from this phone: Close/).setInputFiles(await drawnFile())
      await page.getByText('Kept on this phone').waitFor()
      await visit(page, `/report/${home.unitId}?q=photos`)
      await page.getByText('Kept on this phone').waitFor()
      await context.unroute('**/photos')
      await visit(page, `/report/${home.unitId}?q=photos`)
      await page.getByText(/Received$/).waitFor()
    }, /ERR_FAILED/)
  })

  it('whose answer was lost is sent again and stays one', async () => {
    const roomId = await freshRoom('Box room')
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      await openReport(page)
      await describeCrack(page, 'Box room')
      await skipToSend(page)
      await page.route('**/observations', async (route) => {
        await route.fetch()
        await route.abort()
      }, { times: 1 })
      await press(page, 'Send the report')
      await page.getByText('No connection just now').waitFor()
      expect(await reportsIn(roomId)).toHaveLength(1)
      await press(page, 'Try again now')
      await question(page, 'Sent. Thank you.')
      expect(receiptId(page)).toBe((await reportsIn(roomId))[0]!.id)
    }, /ERR_FAILED/)
    expect(await reportsIn(roomId)).toHaveLength(1)
  })

  it('can be begun anew', async () => {
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      await openReport(page)
      await describeCrack(page, 'Hall')
      await openReport(page)
      await press(page, 'Start again')
      await question(page, 'Which room is it in?')
      expect(await page.getByRole('radio', { checked: true }).count()).toBe(0)
    })
  })

  it('goes one question back by the phone’s own way back', async () => {
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      await openReport(page)
      await describeCrack(page, 'Hall')
      await page.goBack()
      await question(page, 'How long is it, and which way does it run?')
      await press(page, 'Back')
      await question(page, 'How wide is it at its widest?')
      expect(await page.getByRole('radio', { name: /A bank card goes in/ }).isChecked()).toBe(true)
      expect(await page.evaluate(() => document.activeElement?.tagName)).toBe('H1')
    })
  })

  it('refuses a HEIC picture this browser cannot read with words that help, takes six photos, and lets go of one', async () => {
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      await openReport(page)
      await describeCrack(page, 'Hall')
      await visit(page, `/report/${home.unitId}?q=photos`)
      const close = page.getByLabel(/Choose from this phone: Close/)
      await close.setInputFiles({ name: 'IMG_0001.HEIC', mimeType: 'image/heic', buffer: Buffer.concat([Buffer.from([0, 0, 0, 24]), Buffer.from('ftypheic0000mif1heic')]) })
      await page.getByText(/HEIC form.*Most Compatible/).waitFor()
      await press(page, /^Remove photo 1: Close/)
      await close.setInputFiles(await Promise.all(Array.from({ length: 7 }, drawnFile)))
      await page.getByText('6 added. A report holds 6 photos.').waitFor()
      await page.getByText(/Received$/).nth(5).waitFor()
      expect(await close.count()).toBe(0)
      await press(page, /^Remove photo 6: Close/)
      await close.waitFor({ state: 'attached' })
      await press(page, 'Go on')
      await page.getByText('5 received').waitFor()
    })
  })
})
