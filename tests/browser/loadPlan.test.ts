import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { newAttic } from '../api/attic/atticInputs'
import { axeFindings, openBrowser, openPage, screens, sidewaysOverflowPx, visit } from '../support/browser'
import { plantCeilingHome, type CeilingHome } from '../support/ceilingHome'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
let browser: Browser
let home: CeilingHome
beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), openBrowser()])
  home = await plantCeilingHome(server)
})
afterAll(async () => {
  await home?.close()
  await browser?.close()
  await server?.stop()
})

interface Point { x: number, y: number }

async function middleOf(page: Page, locator: Locator): Promise<Point> {
  await locator.scrollIntoViewIfNeeded()
  const box = (await locator.boundingBox())!
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 }
}

/** One finger, or the mouse: down, on the way in steps, up. */
async function drag(page: Page, from: Point, to: Point, byFinger: boolean) {
  const steps = Array.from({ length: 8 }, (_, step) => ({ x: from.x + (to.x - from.x) * (step + 1) / 8, y: from.y + (to.y - from.y) * (step + 1) / 8 }))
  if (!byFinger) {
    await page.mouse.move(from.x, from.y)
    await page.mouse.down()
    for (const point of steps) await page.mouse.move(point.x, point.y)
    await page.mouse.up()
    return
  }
  const finger = await page.context().newCDPSession(page)
  const send = (type: 'touchStart' | 'touchMove' | 'touchEnd', touchPoints: Point[]) => finger.send('Input.dispatchTouchEvent', { type, touchPoints })
  await send('touchStart', [from])
  for (const point of steps) await send('touchMove', [point])
  await send('touchEnd', [])
  await finger.detach()
}

const scrolledPx = (page: Page) => page.evaluate(() => window.scrollY)

/** Books at the left wall, tools at the right, a tree between: all within. */
async function plantAttic() {
  const attic = await newAttic(home, 'Loft over the bedroom')
  await attic.survey()
  await attic.put({ name: 'Books', quantity: 12, lowLb: 45, typicalLb: 45, highLb: 45, weightSource: 'weighed', xFt: 0, yFt: 6, lengthFt: 2.5, widthFt: 3 })
  await attic.put({ name: 'Tools', quantity: 1, lowLb: 120, typicalLb: 120, highLb: 120, weightSource: 'weighed', xFt: 10, yFt: 1, lengthFt: 2, widthFt: 2 })
  await attic.put({ name: 'Tree', quantity: 1, lowLb: 40, typicalLb: 40, highLb: 40, weightSource: 'weighed', xFt: 5, yFt: 12, lengthFt: 2, widthFt: 2 })
  return attic
}

describe.each(screens)('the load plan on a %s', (name, screen) => {
  const byFinger = name === 'phone'

  test('a box dragged to the middle is over at once; the suggested move brings it within; saved only when asked', async () => {
    const attic = await plantAttic()
    const { page, problems, close } = await openPage(browser, { url: server.url, screen, as: home.owner })
    await visit(page, `${attic.path.replace('/api', '')}/load-plan`)
    const plan = page.getByRole('group', { name: /^Load plan: 3 items/ })
    const box = (what: string) => plan.getByRole('button', { name: new RegExp(`^${what}, `) })
    await page.getByRole('heading', { name: 'The first rule' }).waitFor()
    expect(await page.getByRole('heading', { name: 'What to move' }).count()).toBe(0)

    const from = await middleOf(page, box('Books'))
    const sheet = (await plan.boundingBox())!
    const before = await scrolledPx(page)
    await drag(page, from, { x: sheet.x + sheet.width / 2, y: from.y }, byFinger)
    expect(await scrolledPx(page)).toBe(before)
    await page.getByText(/Too dense there/).waitFor()
    await page.getByRole('list', { name: 'Joists' }).getByText(/over/).first().waitFor()
    expect(await box('Books').getAttribute('aria-label')).toMatch(/over, too dense for the middle: .* from the (left|right) wall/)
    await page.getByText(/As saved: within.*On trial: over/).waitFor()
    expect((await attic.read()).contents.state).toBe('within')
    expect(await axeFindings(page)).toEqual([])

    await page.getByRole('heading', { name: 'What to move' }).waitFor()
    await page.getByText(/^1 · Books.*then within/).waitFor()
    await page.getByRole('button', { name: 'Move it there' }).click()
    await page.getByText(/On trial: within/).waitFor()
    expect(await page.getByText(/Too dense there/).count()).toBe(0)
    await page.getByRole('button', { name: 'Save this move' }).click()
    await page.getByText('Saved: the move is in the load history.').waitFor()
    expect((await attic.read()).contents.state).toBe('within')
    expect((await attic.rows.events()).at(-1)).toMatchObject({ kind: 'moved' })
    expect(await sidewaysOverflowPx(page)).toBe(0)
    expect(problems).toEqual([])
    await close()
  })

  test('several things move as one, by keys and presses, and every step can be undone', async () => {
    const attic = await plantAttic()
    const { page, problems, close } = await openPage(browser, { url: server.url, screen, as: home.owner })
    await visit(page, `${attic.path.replace('/api', '')}/load-plan`)
    const plan = page.getByRole('group', { name: /^Load plan: 3 items/ })
    const label = (what: string) => plan.getByRole('button', { name: new RegExp(`^${what}, `) }).getAttribute('aria-label')
    const asFound = await label('Tools')
    await page.getByRole('button', { name: 'Choose several' }).click()
    await page.getByRole('button', { name: 'Choose all' }).click()
    await page.getByText(/3 things chosen, 700/).waitFor()
    await page.getByRole('button', { name: /towards the last joist/ }).click()
    await page.getByRole('button', { name: 'Save these 3 moves' }).waitFor()
    await page.getByRole('button', { name: 'Undo', exact: true }).click()
    await page.getByRole('button', { name: 'Do it again' }).waitFor()
    expect(await label('Tools')).toBe(asFound)

    await page.getByRole('button', { name: 'Choose several' }).click()
    await plan.getByRole('button', { name: /^Tools, / }).focus()
    await page.keyboard.press('Escape')
    await plan.getByRole('button', { name: /^Tree, / }).focus()
    await plan.getByRole('button', { name: /^Tools, / }).focus()
    await page.keyboard.press('ArrowLeft')
    await page.keyboard.press('Shift+ArrowDown')
    expect(await label('Tools')).toMatch(/0\.5.ft from the right wall, on joists 1 to 4/)
    await page.keyboard.press('Control+z')
    await page.keyboard.press('Control+z')
    expect(await label('Tools')).toBe(asFound)

    await page.getByRole('button', { name: 'As a table' }).click()
    await page.getByLabel('Tools, from the left wall, ft').fill('40')
    await page.getByLabel('Tools, from the left wall, ft').press('Enter')
    await page.getByText('Between 0 and 10 ft.').waitFor()
    await page.getByRole('button', { name: 'With strongbacks' }).click()
    await page.getByText(/shows no strongback/).waitFor()
    expect(await axeFindings(page)).toEqual([])
    expect(await sidewaysOverflowPx(page)).toBe(0)
    expect(problems).toEqual([])
    await close()
  })
})

test('on a phone the page scrolls under a finger beside the drawing', async () => {
  const attic = await plantAttic()
  const { page, close } = await openPage(browser, { url: server.url, screen: screens[0][1], as: home.owner })
  await visit(page, `${attic.path.replace('/api', '')}/load-plan`)
  const words = await middleOf(page, page.getByText('The first rule'))
  await drag(page, { x: words.x, y: 700 }, { x: words.x, y: 300 }, true)
  await page.waitForFunction(() => window.scrollY > 100)
  await close()
})
