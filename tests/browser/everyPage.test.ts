import { readdirSync } from 'node:fs'
import { resolve } from 'node:path'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { desk, openBrowser, openPage, phone, visit, wholePageFindings } from '../support/browser'
import type { Client } from '../support/client'
import { startDemoServer, type DemoServer } from '../support/demo'

type Who = 'maren' | 'tomas' | 'bram' | 'ines' | 'nobody'
interface Sample { who: Who, path: string }

const one = (who: Who, path: string): Sample[] => [{ who, path }]
const both = (path: string): Sample[] => [{ who: 'maren', path }, { who: 'tomas', path }]

/** Every page file with who opens it where. `:name` is filled with an id of the demo. A new page must be added here. */
const PAGES: Record<string, Sample[]> = {
  'account.vue': [...both('/account'), { who: 'bram', path: '/account' }],
  'attics/[atticId]/index.vue': [...both('/attics/:attic'), { who: 'ines', path: '/attics/:cottageAttic' }],
  'attics/[atticId]/hatch-card.vue': both('/attics/:attic/hatch-card'),
  'attics/[atticId]/items/new.vue': one('maren', '/attics/:attic/items/new'),
  'attics/[atticId]/items/[itemId].vue': one('maren', '/attics/:attic/items/:item'),
  'attics/[atticId]/list.vue': one('maren', '/attics/:attic/list'),
  'attics/[atticId]/terms.vue': both('/attics/:attic/terms'),
  'attics/[atticId]/load-plan.vue': one('maren', '/attics/:attic/load-plan'),
  'attics/[atticId]/rating.vue': both('/attics/:attic/rating'),
  'attics/[atticId]/surveys.vue': one('maren', '/attics/:attic/surveys'),
  'attics/[atticId]/survey.vue': one('maren', '/attics/:attic/survey'),
  'attics/index.vue': one('maren', '/attics'),
  'begin/[token].vue': one('nobody', '/begin/not-a-token'),
  'attics/[atticId]/unload-trial.vue': one('maren', '/attics/:attic/unload-trial'),
  'findings/ledger.vue': one('maren', '/findings/ledger'),
  'settings/limits.vue': one('maren', '/settings/limits'),
  'unload-trials/[trialId].vue': one('maren', '/unload-trials/:trial'),
  'ceilings.vue': one('maren', '/ceilings'),
  'findings/[findingId].vue': one('maren', '/findings/:finding'),
  'findings/index.vue': one('maren', '/findings'),
  'forgotten-password.vue': one('nobody', '/forgotten-password'),
  'gauge-card.vue': [...both('/gauge-card'), { who: 'bram', path: '/gauge-card' }],
  'homes/index.vue': one('maren', '/homes'),
  'index.vue': [...both('/'), { who: 'bram', path: '/' }],
  'invitation/[token].vue': one('nobody', '/invitation/not-a-token'),
  'jobs/[jobId].vue': [...both('/jobs/:job'), { who: 'bram', path: '/jobs/:job' }],
  'jobs/new.vue': one('maren', '/jobs/new?unit=:unit'),
  'know-your-roof.vue': one('nobody', '/know-your-roof'),
  'marks/[markId]/index.vue': both('/marks/:mark'),
  'marks/[markId]/reading.vue': both('/marks/:mark/reading'),
  'my-home.vue': one('tomas', '/my-home'),
  'no-membership.vue': one('maren', '/no-membership'),
  'notices/[noticeId].vue': both('/notices/:notice'),
  'overview.vue': one('maren', '/overview'),
  'people/index.vue': one('maren', '/people'),
  'people/invite.vue': one('maren', '/people/invite'),
  'properties/[propertyId]/code-basis.vue': one('maren', '/properties/:property/code-basis'),
  'properties/[propertyId]/edit.vue': one('maren', '/properties/:property/edit'),
  'properties/[propertyId]/index.vue': one('maren', '/properties/:property'),
  'properties/new.vue': one('maren', '/properties/new'),
  'report/[unitId].vue': one('tomas', '/report/:unit'),
  'reports/[observationId].vue': one('tomas', '/reports/:observation'),
  'reset-password/[token].vue': one('nobody', '/reset-password/not-a-token'),
  'safety.vue': one('nobody', '/safety'),
  'settings/index.vue': one('maren', '/settings'),
  'settings/reviews.vue': one('maren', '/settings/reviews'),
  'sign-in.vue': one('nobody', '/sign-in'),
  'sign-up.vue': one('nobody', '/sign-up'),
  'units/[unitId]/ceilings.vue': both('/units/:unit/ceilings'),
  'units/[unitId]/edit.vue': one('maren', '/units/:unit/edit'),
  'units/[unitId]/index.vue': [{ who: 'maren', path: '/units/:unit' }, { who: 'ines', path: '/units/:cottage' }],
  'units/[unitId]/paper-report.vue': one('maren', '/units/:unit/paper-report'),
  'units/[unitId]/record.vue': one('maren', '/units/:unit/record'),
  'upkeep.vue': [{ who: 'maren', path: '/upkeep' }, { who: 'bram', path: '/upkeep' }],
}

const root = resolve(import.meta.dirname, '../../pages')
const files = readdirSync(root, { recursive: true, encoding: 'utf8' }).filter(file => file.endsWith('.vue')).sort()

let server: DemoServer
let browser: Browser
const clients = new Map<Who, Client>()
const links = new Map<Who, Set<string>>()

beforeAll(async () => {
  [server, browser] = await Promise.all([startDemoServer(), openBrowser()])
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

async function clientOf(who: Who) {
  if (who === 'nobody') return undefined
  if (!clients.has(who)) clients.set(who, await server.as(who))
  return clients.get(who)
}

const addressOf = (path: string) => path.replace(/:(\w+)/g, (_, name: string) => server.ids[name as keyof DemoServer['ids']])

test('every page file has somebody who opens it here', () => {
  expect(Object.keys(PAGES).sort()).toEqual(files)
})

describe.each(files.flatMap(file => (PAGES[file] ?? []).map(sample => [file, sample] as const)))('%s', (_file, sample) => {
  test(`opened by ${sample.who}: whole, accessible and quiet in both schemes, and nothing hangs over the edge of a phone`, async () => {
    const { page, problems, close } = await openPage(browser, { url: server.url, screen: desk, as: await clientOf(sample.who) })
    expect((await visit(page, addressOf(sample.path)))?.status()).toBe(200)
    expect(await page.locator('h1').count()).toBe(1)
    expect(await page.title()).toMatch(/^.+ · Lathkey$/)
    await collectLinks(sample.who, await page.locator('a[href^="/"]').evaluateAll(found => found.map(link => link.getAttribute('href')!)))
    expect(await wholePageFindings(page, sample.who === 'maren' ? [phone.width] : undefined)).toEqual([])
    expect(problems).toEqual([])
    await close()
  })
})

async function collectLinks(who: Who, found: string[]) {
  const seen = links.get(who) ?? new Set()
  for (const href of found) seen.add(href.split('#')[0]!)
  links.set(who, seen)
}

test('no link seen on the way leads nowhere', async () => {
  const dead: string[] = []
  for (const [who, seen] of links) {
    const client = await clientOf(who)
    for (const href of seen) {
      const answer = client ? await client.send(href) : await fetch(new URL(href, server.url))
      if (answer.status >= 400) dead.push(`${answer.status} ${href} (${who})`)
      await answer.arrayBuffer()
    }
  }
  expect(links.size).toBeGreaterThan(2)
  expect(dead).toEqual([])
}, 240_000)
