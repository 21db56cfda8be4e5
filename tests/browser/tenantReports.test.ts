import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { FindingRow } from '../../shared/types/findingView'
import type { Page as Rows } from '../../shared/types/home'
import { REPORT_QUESTIONS } from '../../shared/types/reportDraft'
import { reportNumber } from '../../shared/utils/report/reportNumber'
import { axeFindings, desk, openBrowser, openPage, phone, screens, sidewaysOverflowPx, visit, type OpenPage, type PageOptions } from '../support/browser'
import { plantCeilingHome, type CeilingHome } from '../support/ceilingHome'
import { inventAddress, tenantTerms } from '../support/people'
import { addPhoto, describeCrack, pick, press, question, skipToSend } from '../support/reportPages'
import { startServer, type TestServer } from '../support/server'

const landlordPhone = '+1 555 0100'
let server: TestServer
let home: CeilingHome
let browser: Browser
beforeAll(async () => {
  server = await startServer()
  home = await plantCeilingHome(server)
  browser = await openBrowser()
  await home.db.updateTable('organisation').set({ contactPhone: landlordPhone }).where('id', '=', home.organisationId).execute()
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

async function expectClean(page: Page, what: string) {
  expect(await axeFindings(page), what).toEqual([])
  expect(await sidewaysOverflowPx(page), what).toBe(0)
}

const openReport = (page: Page) => visit(page, `/report/${home.unitId}`)
const receiptId = (page: Page) => /\/reports\/([\w-]+)/.exec(page.url())?.[1]
const reportsIn = (roomId: string) => home.db.selectFrom('observation').select(['markId', 'dangerSigns']).where('roomId', '=', roomId).orderBy('number').execute()
/** A room no other test reports in. */
async function freshRoom(name: string) {
  const { body } = await home.owner.post<{ id: string }>(`/api/units/${home.unitId}/rooms`, { name })
  return body.id
}

describe('a tenant', () => {
  it.each(screens)('on a %s accepts the invitation and reports a crack with photos; the landlord has a finding and a mail', async (name, screen) => {
    const { body: unit } = await home.owner.post<{ id: string }>(`/api/properties/${home.propertyId}/units`, { name: `Flat for a ${name}` })
    await home.owner.post(`/api/units/${unit.id}/rooms`, { name: 'Parlour', lengthFt: 14, widthFt: 11 })
    const email = inventAddress(`tilda-${name}`)
    await home.owner.post('/api/invitations', { email, role: 'tenant', ...tenantTerms(unit.id) })
    const { text } = await server.mail.waitForMessage(email)
    await within({ screen }, async ({ page }) => {
      await visit(page, new URL(/http\S+\/invitation\/\S+/.exec(text)![0]).pathname)
      await page.getByLabel('Your name').fill('Tilda Invented')
      await page.getByLabel('Choose a password').fill('eleven dry gutters')
      await press(page, 'Accept and go on')
      await page.waitForURL('**/my-home')
      await page.getByRole('link', { name: 'Report something on a ceiling' }).click()
      await describeCrack(page, 'Parlour')
      await page.getByRole('checkbox', { name: 'None of these' }).check()
      await press(page, 'Go on')
      await pick(page, 'They stick a little')
      await press(page, 'Go on')
      await page.getByRole('checkbox', { name: 'Heavy rain' }).check()
      await press(page, 'Go on')
      await question(page, 'Can you take two photos?')
      await addPhoto(page, /Take a photo: The whole ceiling/)
      await addPhoto(page, /Choose from this phone: Close/)
      await press(page, 'Go on')
      await page.getByText('2 received').waitFor()
      await page.getByLabel(/Anything else/).fill('It came overnight.')
      await press(page, 'Send the report')
      await question(page, 'Sent. Thank you.')
      await page.getByText('An e-mail to your landlord is on its way.').waitFor()
      await page.waitForFunction(() => [...document.querySelectorAll<HTMLImageElement>('img[alt^="Photo"]')].filter(image => image.complete && image.naturalWidth > 0).length === 2)
      await expectClean(page, 'receipt')
      const { body } = await home.owner.get<{ number: number, mark: { number: number }, photos: unknown[], answers: object }>(`/api/observations/${receiptId(page)}`)
      await page.getByText(reportNumber(body.number)).waitFor()
      expect(body.photos).toHaveLength(2)
      expect(body.answers).toMatchObject({ kind: 'crack', shape: 'wandering-line', place: 'middle', widthComparison: 'card', doors: 'stick-a-bit', recentEvents: ['heavy-rain'], note: 'It came overnight.' })
      const findings = await home.owner.get<Rows<FindingRow>>(`/api/findings?unit=${unit.id}`)
      expect(findings.body.rows.map(row => row.finding.rule)).toContain('new-mark')
      const mail = await server.mail.waitForMessage(home.ownerEmail, { subject: new RegExp(`Flat for a ${name}`) })
      expect(mail.text.replace(/\s+/g, ' ')).toContain(`Report ${reportNumber(body.number)}, mark ${body.mark.number}`)
      await page.getByRole('link', { name: 'To my home' }).click()
      await page.getByRole('link', { name: 'Crack, Parlour' }).waitFor()
    })
  })

  it('is told at once what to do about a danger sign, and can send from there', async () => {
    const roomId = await freshRoom('Pantry')
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      await openReport(page)
      await describeCrack(page, 'Pantry')
      await page.getByRole('checkbox', { name: 'Bits or plaster are falling' }).check()
      await page.getByText('Leave that room now', { exact: true }).waitFor()
      const call = page.getByRole('link', { name: `Call the landlord: ${landlordPhone}` })
      expect(await call.getAttribute('href')).toBe('tel:+15550100')
      const box = (await call.boundingBox())!
      expect(box.y + box.height, 'the call is in sight without scrolling').toBeLessThanOrEqual(phone.height)
      await page.getByText(/call your emergency number/).first().waitFor()
      await press(page, 'Send this report now')
      await question(page, 'Sent. Thank you.')
      await page.getByText('Leave that room now', { exact: true }).waitFor()
      await expectClean(page, 'receipt of danger')
    })
    expect(await reportsIn(roomId)).toMatchObject([{ dangerSigns: ['bits-falling'] }])
    await server.mail.waitForMessage(home.ownerEmail, { subject: /^Act now: .*Pantry/ })
  })

  it('is told so by what other answers amount to, before the danger signs are asked', async () => {
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      await openReport(page)
      await pick(page, 'Bedroom')
      await press(page, 'Go on')
      await pick(page, /A stain or a wet patch/)
      await press(page, 'Go on')
      await press(page, 'Not sure')
      await press(page, 'Not sure')
      await press(page, 'Not sure')
      await question(page, 'Is it wet?')
      expect(await page.getByText('Leave that room now', { exact: true }).count()).toBe(0)
      await pick(page, 'Dripping')
      await page.getByText('Leave that room now', { exact: true }).waitFor()
      await page.getByText(/Switch the room off at the panel/).waitFor()
    })
  })

  it('cannot go on without a room and a kind, and is told so at the field', async () => {
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      await openReport(page)
      await press(page, 'Go on')
      await page.getByRole('alert').getByRole('link', { name: 'Choose the room first.' }).waitFor()
      await pick(page, 'Hall')
      await press(page, 'Go on')
      await press(page, 'Go on')
      await page.getByRole('alert').getByRole('link', { name: 'Choose what is most like it.' }).waitFor()
      await visit(page, `/report/${home.unitId}?q=send`)
      await question(page, 'What does it look like?')
    })
  })

  it('says that it is the same as a mark that is followed, and the report joins it', async () => {
    const roomId = await freshRoom('Study')
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      for (const answer of ['A new one', 'the same']) {
        await openReport(page)
        await describeCrack(page, 'Study')
        await skipToSend(page)
        if (answer === 'the same') await pick(page, /^Yes: Crack, Study/)
        await press(page, 'Send the report')
        await question(page, 'Sent. Thank you.')
      }
      await page.getByText('It was added to what is being followed there already.').waitFor()
    })
    const reports = await reportsIn(roomId)
    expect(reports).toHaveLength(2)
    expect(reports[0]!.markId).toBe(reports[1]!.markId)
  })

  it('of another home, or signed out, does not get in', async () => {
    await within({ as: home.neighbour }, async ({ page }) => {
      expect((await visit(page, `/report/${home.unitId}`))?.status()).toBe(404)
    }, /404/)
    await within({}, async ({ page }) => {
      await visit(page, `/report/${home.unitId}`)
      expect(new URL(page.url()).pathname).toBe('/sign-in')
    })
  })
})

describe('every page of a tenant', () => {
  it.each([['light', desk], ['dark', { width: 320, height: 640 }]] as const)('is clean and fits, %s', async (scheme, screen) => {
    await within({ screen, scheme, as: home.tenant }, async ({ page }) => {
      await openReport(page)
      await pick(page, 'Bedroom')
      const ownToTheKind = ['shape', 'size', 'wet'] as const
      for (const [look, questions] of [['A gap along the wall', REPORT_QUESTIONS], ['It hangs or bulges', ownToTheKind], ['Round bumps one, a row, or here and there', ownToTheKind]] as const) {
        await visit(page, `/report/${home.unitId}?q=look`)
        await pick(page, look)
        for (const asked of questions) {
          await visit(page, `/report/${home.unitId}?q=${asked}`)
          await expectClean(page, `${look}, ${asked}`)
        }
      }
      for (const path of ['/my-home', '/safety']) {
        expect((await visit(page, path))?.status()).toBe(200)
        await expectClean(page, path)
      }
    })
  })

  it('safety is open to everybody', async () => {
    await within({}, async ({ page }) => {
      expect((await visit(page, '/safety'))?.status()).toBe(200)
      for (const caution of ['Leave the room first', 'Trusses: no storage', 'May hold asbestos', 'An estimate, not an assessment']) await page.getByText(caution, { exact: true }).waitFor()
    })
  })

  it('lists the homes of a person who lives in two', async () => {
    const { tenancyId } = await home.db.selectFrom('tenancyPerson').innerJoin('tenancy', 'tenancy.id', 'tenancyPerson.tenancyId').select('tenancyId').where('tenancy.unitId', '=', home.otherUnitId).executeTakeFirstOrThrow()
    await home.db.insertInto('tenancyPerson').values({ tenancyId, organisationId: home.organisationId, userId: home.tenantId }).execute()
    await within({ screen: phone, as: home.tenant }, async ({ page }) => {
      await visit(page, '/my-home')
      await page.getByRole('heading', { name: 'Your homes' }).waitFor()
      await expectClean(page, 'homes')
      await page.getByRole('link', { name: 'Invented Row, Flat 2' }).click()
      await page.getByText('Flat 2').waitFor()
    })
    await home.db.deleteFrom('tenancyPerson').where('tenancyId', '=', tenancyId).where('userId', '=', home.tenantId).execute()
  })
})

describe('a landlord', () => {
  it('reads the report and puts on record that it was put right', async () => {
    const { body } = await home.tenant.post<{ id: string }>(`/api/units/${home.unitId}/observations`, { kind: 'crack', roomId: home.hallId, dangerSigns: ['fast-widening'] }, { headers: { 'idempotency-key': crypto.randomUUID() } })
    await within({ screen: desk, as: home.owner }, async ({ page }) => {
      await visit(page, `/reports/${body.id}`)
      await page.getByText('Sent by Tessa Invented.').waitFor()
      await press(page, 'Put it on record')
      await page.getByRole('alert').waitFor()
      await pick(page, 'It was put right')
      await page.getByLabel('What was done or found').fill('Loose plaster taken down by a plasterer.')
      await expectClean(page, 'report at a desk')
      await press(page, 'Put it on record')
      await page.getByText('This was put right.').waitFor()
      expect(await page.getByText('Leave that room now').count()).toBe(0)
    })
  })
})
