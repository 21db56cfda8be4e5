import { AxeBuilder } from '@axe-core/playwright'
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core'
import { inject } from 'vitest'
import { chromiumPath } from '../../scripts/lib/chromium.mjs'
import type { Client } from './client'

export const phone = { width: 390, height: 844 } as const
export const desk = { width: 1280, height: 900 } as const
export const screens = [['phone', phone], ['desk', desk]] as const
export const schemes = ['light', 'dark'] as const
export type Scheme = typeof schemes[number]

export interface Screen { width: number, height: number }

export interface OpenPage {
  page: Page
  context: BrowserContext
  /** Console errors, uncaught exceptions and answers of 500 and above, as they happened. */
  problems: string[]
  close: () => Promise<void>
}

export function openBrowser(): Promise<Browser> {
  const { folder } = inject('testServices')
  return chromium.launch({
    executablePath: chromiumPath,
    // Chromium keeps a socket in the temporary folder, whose path has to be short.
    env: { ...process.env, HOME: folder, XDG_CONFIG_HOME: folder, XDG_CACHE_HOME: folder, TMPDIR: '/tmp' },
    args: ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync', '--disable-dev-shm-usage'],
  })
}

export interface PageOptions {
  /** The server's address; paths given to page.goto are relative to it. */
  url: string
  screen?: Screen
  scheme?: Scheme
  /** Opens the page signed in as this client is. */
  as?: Client
  /** Whole-page tests without a finger use a mouse; phones have a touch screen. */
  hasTouch?: boolean
}

/** A page with a context of its own: no cookie, no draft, no cache of an earlier one. */
export async function openPage(browser: Browser, { url, screen = desk, scheme = 'light', as, hasTouch = screen.width < 600 }: PageOptions): Promise<OpenPage> {
  const context = await browser.newContext({
    baseURL: url, viewport: { width: screen.width, height: screen.height }, colorScheme: scheme, reducedMotion: 'reduce', locale: 'en-US', timezoneId: 'UTC', hasTouch,
  })
  if (as) await becomeClient(context, as)
  const page = await context.newPage()
  page.setDefaultTimeout(15_000)
  const problems: string[] = []
  page.on('console', (message) => {
    if (message.type() === 'error') problems.push(`console at ${page.url()}: ${message.text()}`)
  })
  page.on('pageerror', error => problems.push(`exception at ${page.url()}: ${error.message}`))
  page.on('response', (response) => {
    if (response.status() >= 500) problems.push(`${response.status()} from ${response.url()}`)
  })
  return { page, context, problems, close: () => context.close() }
}

/** Takes the client's session over into the browser. */
export async function becomeClient(context: BrowserContext, client: Client) {
  await context.addCookies(client.cookies().map(({ name, value }) => ({ name, value, url: client.url, httpOnly: true, secure: true, sameSite: 'Lax' as const })))
}

/** Goes there and waits until the page answers to clicks, not only until it shows. */
export async function visit(page: Page, path: string) {
  const response = await page.goto(path, { waitUntil: 'load' })
  await page.waitForFunction(() => {
    const root = document.querySelector('#__nuxt') as (Element & { __vue_app__?: unknown }) | null
    return root?.__vue_app__ !== undefined
  })
  return response
}

const wcag22 = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']

/** What axe finds against WCAG 2.2 A and AA, one line each; empty when clean. */
export const axeFindings = (page: Page) => findingsOf(new AxeBuilder({ page }).withTags(wcag22))

/** The part of it that another colour scheme can change. */
const contrastFindings = (page: Page) => findingsOf(new AxeBuilder({ page }).withRules(['color-contrast', 'link-in-text-block']))

async function findingsOf(axe: AxeBuilder): Promise<string[]> {
  const { violations } = await axe.analyze()
  return violations.map(({ id, help, nodes }) => `${id}: ${help} — ${nodes.map(node => node.target.join(' ')).join(' | ')}`)
}

/** All that is asked of a page on a desk in both schemes and on narrow phones; leaves it dark and narrow. */
export async function wholePageFindings(page: Page, widths: readonly number[] = [phone.width, 320]): Promise<string[]> {
  const found = await axeFindings(page)
  await page.emulateMedia({ colorScheme: 'dark' })
  found.push(...(await contrastFindings(page)).map(finding => `dark: ${finding}`))
  for (const width of widths) {
    await page.setViewportSize({ width, height: phone.height })
    const overflowPx = await settledOverflowPx(page)
    if (overflowPx > 0) found.push(`${overflowPx} px too wide at ${width} px`)
  }
  return found
}

/** Charts draw themselves again a moment after the room has changed. */
async function settledOverflowPx(page: Page): Promise<number> {
  for (let look = 0; look < 30 && await sidewaysOverflowPx(page) > 0; look += 1) await page.waitForTimeout(100)
  return sidewaysOverflowPx(page)
}

/** How far the page can be scrolled sideways; 0 where everything fits. */
export function sidewaysOverflowPx(page: Page): Promise<number> {
  return page.evaluate(() => Math.max(0, document.documentElement.scrollWidth - document.documentElement.clientWidth))
}
