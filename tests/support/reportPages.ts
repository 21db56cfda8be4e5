import type { Page } from 'playwright-core'
import { drawnPhoto } from './ceilingHome'

/** The tenant's pages as a person goes through them: by heading, label and button. */

export const press = (page: Page, name: string | RegExp) => page.getByRole('button', typeof name === 'string' ? { name, exact: true } : { name }).click()
export const pick = (page: Page, name: string | RegExp) => page.getByRole('radio', typeof name === 'string' ? { name, exact: true } : { name }).check()
export const question = (page: Page, heading: string) => page.getByRole('heading', { level: 1, name: heading }).waitFor()

let seed = 0
/** A drawn picture unlike any before it. */
export const drawnFile = async () => ({ name: `ceiling-${++seed}.jpg`, mimeType: 'image/jpeg', buffer: await drawnPhoto(seed) })

export async function addPhoto(page: Page, label: RegExp) {
  const received = page.getByText(/Received$/)
  const before = await received.count()
  await page.getByLabel(label).setInputFiles(await drawnFile())
  await received.nth(before).waitFor()
}

/** From the room to the danger signs of a crack. */
export async function describeCrack(page: Page, room: string, look = 'A line that wanders') {
  await question(page, 'Which room is it in?')
  await pick(page, room)
  await press(page, 'Go on')
  await question(page, 'What does it look like?')
  await pick(page, look)
  await press(page, 'Go on')
  await question(page, 'Where on the ceiling is it?')
  await page.getByRole('group', { name: `Ceiling of ${room}` }).click({ position: { x: 40, y: 40 } })
  await pick(page, 'Out in the middle')
  await press(page, 'Go on')
  await question(page, 'How wide is it at its widest?')
  await pick(page, /A bank card goes in, a dime does not/)
  await press(page, 'Go on')
  await question(page, 'How long is it, and which way does it run?')
  await press(page, 'Not sure')
  await question(page, 'Is any of this happening?')
}

/** From there to the last look, with nothing more to say. */
export async function skipToSend(page: Page) {
  await page.getByRole('checkbox', { name: 'None of these' }).check()
  await press(page, 'Go on')
  await question(page, 'Have doors or sounds changed?')
  await press(page, 'Not sure')
  await question(page, 'Did anything happen lately?')
  await press(page, 'Not sure')
  await question(page, 'Can you take two photos?')
  await press(page, 'Without photos')
  await question(page, 'Look it over and send')
}
