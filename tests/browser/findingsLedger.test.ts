import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import type { UnloadTrialRow, UnloadTrialView } from '../../shared/types/unloadTrial'
import type { Client } from '../support/client'
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

/** One trial at a time in an attic; the demo has one under way. */
async function endRunningTrials(client: Client) {
  const { body } = await client.get<{ rows: UnloadTrialRow[] }>(`/api/unload-trials?attic=${server.ids.attic}`)
  for (const trial of body.rows.filter(row => ['planned', 'unloaded'].includes(row.state))) {
    const { body: { today } } = await client.get<UnloadTrialView>(`/api/unload-trials/${trial.id}`)
    expect((await client.post(`/api/unload-trials/${trial.id}/ending`, { endedOn: today, version: trial.version })).status).toBe(200)
  }
}

describe.each(screens)('the owner on a %s', (name, screen) => {
  test('finds a finding by filter, judges it, tries other limits on the past, keeps them, and plans an unload trial', async () => {
    const maren = await server.as('maren')
    const { page, problems, close } = await openPage(browser, { url: server.url, screen, as: maren })
    await endRunningTrials(maren)
    await visit(page, '/findings')
    await page.getByLabel('What was found').selectOption('mark-active')
    await page.getByRole('button', { name: 'Show', exact: true }).click()
    await page.waitForURL(/rule=mark-active/)
    await page.getByRole('main').getByRole('listitem').getByRole('link').first().click()
    await page.getByRole('heading', { name: 'Was it right?' }).waitFor()
    await page.getByText(/Say (it anew|whether it was right)/).click()
    await page.getByLabel('A false alarm').check()
    await page.getByLabel('How do you know?').fill(`The plaster was only loose paint (${name}).`)
    await page.getByRole('button', { name: 'Keep it in the ledger' }).click()
    await page.getByText(`The plaster was only loose paint (${name}).`).waitFor()

    await visit(page, '/findings/ledger?list=wrong')
    await page.getByText(`The plaster was only loose paint (${name}).`).waitFor()
    await page.getByRole('link', { name: 'Try other limits' }).click()
    await page.getByLabel('Fewest readings').fill(name === 'phone' ? '24' : '12')
    await page.getByLabel('Smallest sudden jump').fill('9')
    await page.getByRole('button', { name: 'See what would have changed' }).click()
    await page.getByText('From 0.3 to 3, please.').first().waitFor()
    await page.getByLabel('Smallest sudden jump').fill('1')
    await page.getByRole('button', { name: 'See what would have changed' }).click()
    await page.getByText(/Alarms: \d+ instead of \d+/).waitFor()
    await page.getByRole('button', { name: 'Keep these limits' }).click()
    await page.getByText('Kept. Every mark is judged by these limits from now on.').waitFor()

    await visit(page, `/attics/${server.ids.attic}/unload-trial`)
    await page.getByLabel('What do you want to find out?').fill(`Does it rest without the cartons? (${name})`)
    await page.getByRole('checkbox', { name: /Medium carton/ }).check()
    await page.getByRole('checkbox', { name: /Mark \d+/ }).first().check()
    await page.getByRole('button', { name: 'Plan the trial' }).click()
    await page.waitForURL(/\/unload-trials\//)
    await page.getByText(/Do not wait for the trial/).waitFor()
    await page.getByText('Give the trial up').click()
    await page.getByRole('button', { name: 'Give it up' }).click()
    await page.getByText('Given up').waitFor()
    expect(problems.filter(problem => !problem.includes('422'))).toEqual([])
    await close()
  })
})
