import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Connection } from '../../server/db/connect'
import type { Me } from '../../shared/types/people'
import { desk, openBrowser, openPage, phone, visit, wholePageFindings, type OpenPage } from '../support/browser'
import { begin, inventOwner, signUp, type Client } from '../support/client'
import { bringIn, inventAddress, lookInto, makeHome, newestLink, tenantTerms } from '../support/people'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
let rows: Connection
let browser: Browser
beforeAll(async () => {
  server = await startServer()
  rows = lookInto(server)
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await rows.close()
  await server.stop()
})

const pathOf = (page: Page) => new URL(page.url()).pathname
const press = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).click()
const mailedLink = async (address: string, page: string) => {
  const { text } = await server.mail.waitForMessage(address)
  return new URL(new RegExp(`http\\S+/${page}/\\S+`).exec(text)![0]).pathname
}

async function within(options: Parameters<typeof openPage>[1], work: (opened: OpenPage) => Promise<void>, expected: RegExp = /^$/) {
  const opened = await openPage(browser, options)
  try {
    await work(opened)
    expect(opened.problems.filter(problem => !expected.test(problem))).toEqual([])
  }
  finally { await opened.close() }
}

describe('coming in', () => {
  it('somebody sets up an account on a phone, signs out, and comes back to the page they asked for', async () => {
    const owner = inventOwner()
    await within({ url: server.url, screen: phone }, async ({ page }) => {
      await visit(page, '/sign-up')
      await press(page, 'Mail me a link to begin')
      await page.getByRole('alert').getByText('3 things need another look').waitFor()
      await page.getByLabel('Name of your household or firm').fill(owner.organisationName)
      await page.getByLabel('Your name').fill(owner.name)
      await page.getByLabel('E-mail address').fill(owner.email)
      await press(page, 'Mail me a link to begin')
      await page.getByText('Look in your mail').waitFor()
      await visit(page, await mailedLink(owner.email, 'begin'))
      await press(page, 'Set up the account')
      await page.getByRole('alert').waitFor()
      await page.getByLabel('Choose a password').fill(owner.password)
      await press(page, 'Set up the account')
      await page.waitForURL('**/overview')
      await visit(page, '/account')
      await press(page, 'Sign out')
      await page.waitForURL('**/sign-in')
      await visit(page, '/account')
      expect(pathOf(page)).toBe('/sign-in')
      await page.getByLabel('E-mail address').fill(owner.email)
      await page.getByLabel('Password').fill('not the password')
      await press(page, 'Sign in')
      await page.getByRole('alert').getByText('This address and this password do not go together.').waitFor()
      expect(await page.getByLabel('E-mail address').inputValue()).toBe(owner.email)
      await page.getByLabel('Password').fill(owner.password)
      await press(page, 'Sign in')
      await page.waitForURL('**/account')
    }, /401/)
  })

  it('what is typed and ticked before the page\'s script has come is not lost', async () => {
    const { client, owner } = await signUp(server.url)
    const held = async (page: Page, path: string, work: () => Promise<void>) => {
      let release = () => {}
      const released = new Promise<void>(resolve => release = resolve)
      await page.route('**/_nuxt/*.js', route => released.then(() => route.continue()))
      await page.goto(path, { waitUntil: 'commit' })
      await work()
      release()
      await page.waitForLoadState('networkidle')
    }
    await within({ url: server.url, screen: phone }, async ({ page }) => {
      await held(page, '/sign-in', async () => {
        await page.getByLabel('E-mail address').fill(owner.email)
        await page.getByLabel('Password').fill(owner.password)
      })
      expect(await page.getByLabel('E-mail address').inputValue()).toBe(owner.email)
      await press(page, 'Sign in')
      await page.waitForURL('**/overview')
    })
    await within({ url: server.url, screen: phone, as: client }, async ({ page }) => {
      const digest = page.getByRole('checkbox').first()
      await held(page, '/account', () => digest.uncheck())
      await press(page, 'Save')
      await expect.poll(async () => (await client.get<Me>('/api/me')).body.digest).toBe(false)
      expect(await digest.isChecked()).toBe(false)
    })
  })

  it('a forgotten password is set anew by the mailed link', async () => {
    const { owner } = await signUp(server.url)
    await within({ url: server.url, screen: desk }, async ({ page }) => {
      await visit(page, '/forgotten-password')
      await page.getByLabel('E-mail address').fill(owner.email)
      await press(page, 'Mail me a link')
      await page.getByText('Look in your mail').waitFor()
      const path = await mailedLink(owner.email, 'reset-password')
      await visit(page, path)
      await page.getByLabel('New password').fill('six slow snails')
      await press(page, 'Set the password and sign in')
      await page.waitForURL('**/overview')
      await visit(page, path)
      await page.getByText('This link does not open anything any more').waitFor()
    })
  })

  it('an owner invites a tenant at a desk, who accepts on a phone and lands at their home', async () => {
    const { client } = await signUp(server.url)
    const { unitId } = await makeHome(client)
    const email = inventAddress('tilda')
    await within({ url: server.url, screen: desk, as: client }, async ({ page }) => {
      await visit(page, `/people/invite?unit=${unitId}`)
      await page.getByRole('radio', { name: /^Tenant/ }).check()
      await page.getByLabel('Their e-mail address').fill(email)
      await page.getByLabel('Name on the tenancy').fill('Tilda Invented')
      await press(page, 'Send the invitation')
      await page.getByText(`The invitation to ${email} is on its way`).waitFor()
      await page.getByRole('link', { name: 'To the people' }).click()
      await page.getByText('Tenancy of Tilda Invented').waitFor()
    })
    const path = await mailedLink(email, 'invitation')
    await within({ url: server.url, screen: phone }, async ({ page }) => {
      await visit(page, path)
      await page.getByText('Invented Row, Number 4').waitFor()
      await page.getByLabel('Your name').fill('Tilda Invented')
      await page.getByLabel('Choose a password').fill('eleven dry gutters')
      await press(page, 'Accept and go on')
      await page.waitForURL('**/my-home')
    })
  })
})

describe('tending people and the account', () => {
  it('access is ended after one more question, and the row goes', async () => {
    const { client } = await signUp(server.url)
    const trades = await bringIn(server, rows, client, 'trades')
    await within({ url: server.url, screen: desk, as: client }, async ({ page }) => {
      await visit(page, '/people')
      await page.getByRole('button', { name: new RegExp(`^End access ?: ${trades.name}$`) }).click()
      await press(page, 'End access now')
      await page.getByText(`${trades.name} no longer has access.`).waitFor()
      await page.getByText(trades.email).waitFor({ state: 'detached' })
    })
  })

  it('details changed in two windows are shown side by side, and mine can be kept', async () => {
    const { client } = await signUp(server.url)
    await within({ url: server.url, screen: phone, as: client }, async ({ page }) => {
      await visit(page, '/account')
      await client.patch('/api/me', { name: 'Theirs', phone: null, unitsOfMeasure: 'us', digest: true, version: 1 })
      await page.getByLabel('Name', { exact: true }).fill('Mine')
      await press(page, 'Save')
      await page.getByText('Another window of yours changed this').waitFor()
      await press(page, 'Save mine over theirs')
      await page.getByText('Saved.').waitFor()
      expect((await client.get<{ user: { name: string } }>('/api/me')).body.user.name).toBe('Mine')
    }, /409/)
  })

  it('a session ended elsewhere leads to the sign-in page at the next read, and back', async () => {
    const { client, owner } = await signUp(server.url)
    await within({ url: server.url, screen: desk, as: client }, async ({ page }) => {
      await visit(page, '/people')
      await rows.db.updateTable('appUser').set(eb => ({ sessionEpoch: eb('sessionEpoch', '+', 1) })).where('email', '=', owner.email).execute()
      await page.getByLabel('Name or address has').fill('x')
      await press(page, 'Look')
      await page.waitForURL('**/sign-in?next=**')
    }, /401/)
  })
})

describe('every page of accounts', () => {
  let client: Client
  let pages: { path: string, isPrivate: boolean }[]
  beforeAll(async () => {
    const made = await signUp(server.url)
    client = made.client
    const home = await makeHome(client)
    await bringIn(server, rows, client, 'tenant', tenantTerms(home.unitId))
    await begin(client, { ...made.owner, organisationName: 'Second House' })
    await client.post('/api/auth/sign-up', { organisationName: 'Third House', name: made.owner.name, email: made.owner.email })
    const email = inventAddress('waiting')
    await client.post('/api/invitations', { email, role: 'tenant', unitId: (await makeHome(client, 'Number 6')).unitId, tenantName: 'W', startsOn: '2020-01-01' })
    await client.post('/api/auth/forgotten-password', { email: made.owner.email })
    const open = (path: string) => ({ path, isPrivate: false })
    const closed = (path: string) => ({ path, isPrivate: true })
    pages = [
      open(`/begin/${await newestLink(rows, made.owner.email, 'begin')}`),
      open(`/reset-password/${await newestLink(rows, made.owner.email, 'reset-password')}`),
      open(`/invitation/${await newestLink(rows, email, 'invitation')}`), closed(`/invitation/${await newestLink(rows, email, 'invitation')}`),
      closed('/people'), closed('/people/invite?role=tenant'), closed('/account'),
    ]
  })

  it('has nothing for axe in both schemes, fits its width down to 320 px, and keeps the console quiet', async () => {
    const found: string[] = []
    for (const { path, isPrivate } of pages) {
      await within({ url: server.url, as: isPrivate ? client : undefined }, async ({ page }) => {
        await visit(page, path)
        found.push(...(await wholePageFindings(page)).map(finding => `${path}: ${finding}`))
      })
    }
    expect(found).toEqual([])
  })
})
