import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { judgeAttic } from '../../server/db/commands/judgeAttic'
import { judgeMark } from '../../server/db/commands/judgeMark'
import type { JobView } from '../../shared/types/job'
import { addItem, addMark, addReport, addSurvey, today } from '../api/review/inventHome'
import { openServer, type OpenHome, type OpenServer } from '../api/review/openHome'
import { axeFindings, desk, openBrowser, openPage, phone, schemes, screens, sidewaysOverflowPx, visit, type PageOptions } from '../support/browser'
import type { Client } from '../support/client'

let open: OpenServer
let browser: Browser
let home: OpenHome

beforeAll(async () => {
  [open, browser] = await Promise.all([openServer(), openBrowser()])
  home = await open.openHome()
  await addSurvey(open.db, home)
  await addItem(open.db, home, 5500)
  const mark = await addMark(open.db, home, { createdDaysAgo: 5 })
  await addReport(open.db, home, mark, ['bits-falling'])
  await open.db.transaction().execute(async (trx) => {
    await judgeAttic(trx, { userId: null, name: 'Test' }, home.atticId)
    await judgeMark(trx, { userId: null, name: 'Test' }, mark)
  })
})
afterAll(async () => {
  await browser.close()
  await open.close()
})

const on = (as: Client, options: Partial<PageOptions> = {}) => openPage(browser, { url: open.server.url, as, ...options })
const findingId = async (rule: string) => (await open.db.selectFrom('finding').select('id').where('organisationId', '=', home.organisationId).where('rule', '=', rule as 'attic-load').executeTakeFirstOrThrow()).id
const plan = async (body: object) => (await home.as.manager.post<JobView>('/api/jobs', { unitId: home.unitId, title: 'Look at the ceiling', ...body })).body

describe('findings on screen', () => {
  it('lead from the list to why, its numbers and what to do, and can be let rest with a reason', async () => {
    const { page, problems, close } = await on(home.as.owner, { screen: desk })
    await visit(page, '/findings')
    await page.getByRole('link', { name: 'New mark under a loaded attic' }).click()
    await page.getByRole('heading', { name: 'New mark under a loaded attic' }).waitFor()
    await page.getByText('First seen').first().waitFor()
    await page.getByRole('button', { name: 'Let it rest until then' }).click()
    await page.getByText('Why can this wait? A few words are enough.').first().waitFor()
    await page.getByLabel('Why can it wait?').fill('The plasterer comes next week')
    await page.getByLabel('Look again on').fill(today(14))
    await page.getByRole('button', { name: 'Let it rest until then' }).click()
    await page.getByRole('heading', { name: 'It rests' }).waitFor()
    await page.getByText('It rests until the day you gave.').waitFor()
    await page.getByText('The plasterer comes next week').first().waitFor()
    await page.getByRole('button', { name: 'Bring it back now' }).click()
    await page.getByRole('heading', { name: 'If it can wait' }).waitFor()
    expect(problems).toEqual([])
    await close()
  })

  it('say at once to leave the room where a danger sign was reported', async () => {
    const { page, close } = await on(home.as.manager, { screen: phone })
    await visit(page, `/findings/${await findingId('danger-sign')}`)
    expect(await page.getByText('Leave the room, keep others out, and call for help.').count()).toBeGreaterThan(0)
    await close()
  })
})

describe('a job on screen', () => {
  it('is planned from a finding, done by the trades on a phone, and confirmed', async () => {
    const desktop = await on(home.as.owner, { screen: desk })
    await visit(desktop.page, `/jobs/new?unit=${home.unitId}&finding=${await findingId('attic-load')}`)
    await desktop.page.getByLabel('What is to be done').fill('Carry the boxes down')
    await desktop.page.getByLabel(/^Who does it/).selectOption({ label: 'Tor' })
    await desktop.page.getByRole('button', { name: 'Plan the job' }).click()
    await desktop.page.getByRole('heading', { name: 'Carry the boxes down' }).waitFor()
    const path = new URL(desktop.page.url()).pathname

    const mobile = await on(home.as.trades, { screen: phone })
    await visit(mobile.page, '/upkeep')
    await mobile.page.getByRole('link', { name: 'Carry the boxes down' }).click()
    await mobile.page.getByText('may hold asbestos').waitFor()
    await mobile.page.getByText('step on joists or decking only').waitFor()
    await mobile.page.getByRole('button', { name: 'It is done' }).click()
    await mobile.page.getByLabel('What was done and found').fill('All boxes are in the shed')
    await mobile.page.getByLabel('What it cost').fill('120.50')
    await mobile.page.getByRole('button', { name: 'It is done' }).last().click()
    await mobile.page.getByText('Done, to be confirmed').first().waitFor()
    expect(await mobile.page.getByRole('button', { name: 'Confirm that it is done' }).count()).toBe(0)

    await visit(desktop.page, path)
    await desktop.page.getByText('$120.50').waitFor()
    await desktop.page.getByRole('button', { name: 'Confirm that it is done' }).click()
    await desktop.page.getByRole('button', { name: 'Confirm that it is done' }).last().click()
    await desktop.page.getByText('Kept. It is now at “confirmed”.').waitFor()
    expect([...desktop.problems, ...mobile.problems]).toEqual([])
    await Promise.all([desktop.close(), mobile.close()])
  })

  it('shows both versions when two people change it, and keeps the one that is chosen', async () => {
    const job = await plan({})
    const { page, problems, close } = await on(home.as.owner, { screen: desk })
    await visit(page, `/jobs/${job.id}`)
    await page.getByText('Change what, who or when').click()
    await home.as.manager.patch(`/api/jobs/${job.id}`, { version: job.version, title: 'Theirs' })
    await page.getByLabel('What is to be done').fill('Mine')
    await page.getByRole('button', { name: 'Save the changes' }).click()
    await page.getByRole('cell', { name: 'Theirs' }).waitFor()
    await page.getByRole('button', { name: 'Save mine over theirs' }).click()
    await page.getByRole('heading', { name: 'Mine', level: 1 }).waitFor()
    // The refused save shows as a 409 in the console, and as nothing else.
    expect(problems.filter(problem => !problem.includes('409'))).toEqual([])
    await close()
  })
})

describe('settings on screen', () => {
  it('are kept by an owner, and only read by a manager', async () => {
    const { page, problems, close } = await on(home.as.owner, { screen: phone })
    await visit(page, '/settings')
    await page.getByLabel('Urgent: put right within').fill('48')
    await page.getByLabel('Daily review at').selectOption({ label: '07:00' })
    await page.getByRole('button', { name: 'Save the settings' }).click()
    await page.getByText('Saved.').waitFor()
    await page.getByLabel('Danger: put right within').fill('soon')
    await page.getByRole('button', { name: 'Save the settings' }).click()
    await page.getByRole('alert').waitFor()
    expect(problems).toEqual([])
    await close()
    const manager = await on(home.as.manager, { screen: phone })
    await visit(manager.page, '/settings')
    await manager.page.getByText('48 hours').waitFor()
    expect(await manager.page.getByRole('button', { name: 'Save the settings' }).count()).toBe(0)
    await manager.close()
  })

  it('run a review by hand, with its progress and its outcome', async () => {
    const { page, problems, close } = await on(home.as.manager, { screen: desk })
    await visit(page, '/settings/reviews')
    await page.getByRole('button', { name: 'Run a review now' }).click()
    await page.getByText(/The review is done: 1.home judged/).waitFor({ timeout: 30_000 })
    await page.getByRole('cell', { name: 'Milo', exact: true }).waitFor()
    expect(problems).toEqual([])
    await close()
  })
})

describe('every page of upkeep and settings', () => {
  it.each(screens)('has no finding of axe, no console error and nothing wider than the screen on a %s', async (_, screen) => {
    const job = await plan({ assigneeUserId: home.trades, description: 'Ring first' })
    const pages: [string, Client][] = [
      ['/findings', home.as.owner], ['/findings?list=cleared&search=nothing', home.as.owner], [`/findings/${await findingId('danger-sign')}`, home.as.owner],
      [`/jobs/new?unit=${home.unitId}`, home.as.owner], ['/upkeep', home.as.owner], ['/upkeep', home.as.trades], [`/jobs/${job.id}`, home.as.owner], [`/jobs/${job.id}`, home.as.trades], [`/jobs/${job.id}`, home.as.tenant],
      ['/settings', home.as.owner], ['/settings', home.as.manager], ['/settings/reviews', home.as.owner],
    ]
    // Both schemes on a phone; a desk lays the same colours out wider, so the dark one stands for both.
    for (const scheme of screen === phone ? schemes : ['dark'] as const) {
      for (const [path, as] of pages) {
        const { page, problems, close } = await on(as, { screen, scheme })
        await visit(page, path)
        expect({ path, scheme, axe: await axeFindings(page), overflow: await sidewaysOverflowPx(page), problems }).toEqual({ path, scheme, axe: [], overflow: 0, problems: [] })
        await close()
      }
    }
  })

  it('fits 320 px', async () => {
    for (const path of ['/findings', `/findings/${await findingId('attic-load')}`, '/upkeep', '/jobs/new', '/settings', '/settings/reviews']) {
      const { page, close } = await on(home.as.owner, { screen: { width: 320, height: 700 } })
      await visit(page, path)
      expect([path, await sidewaysOverflowPx(page)]).toEqual([path, 0])
      await close()
    }
  })
})
