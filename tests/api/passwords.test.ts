import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Connection } from '../../server/db/connect'
import { createClient, signIn, signUp } from '../support/client'
import { inventAddress, lookInto, newestLink, type Refusal } from '../support/people'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
let rows: Connection
beforeAll(async () => {
  server = await startServer()
  rows = lookInto(server)
})
afterAll(async () => {
  await rows.close()
  await server.stop()
})

const mailsTo = (address: string) => rows.db.selectFrom('message').select(['kind', 'mailClass', 'organisationId', 'subject']).where('toAddress', '=', address).where('kind', '<>', 'sign-up').orderBy('createdAt').execute()

describe('change of password', () => {
  it('ends every other session, keeps this one, and says so by mail', async () => {
    const { client, owner } = await signUp(server.url)
    const other = await signIn(server.url, owner)
    expect((await client.post('/api/me/password', { current: owner.password, password: 'five dry rafters' })).status).toBe(200)
    expect((await client.get('/api/me')).status).toBe(200)
    expect((await other.get('/api/me')).status).toBe(401)
    expect((await createClient(server.url).post('/api/auth/sign-in', { email: owner.email, password: owner.password })).status).toBe(401)
    await signIn(server.url, { ...owner, password: 'five dry rafters' })
    expect(await mailsTo(owner.email)).toEqual([{ kind: 'password-changed', mailClass: 'account', organisationId: null, subject: 'Your password was changed' }])
  })

  it('needs the present one, and a new one that is long enough and different', async () => {
    const { client, owner } = await signUp(server.url)
    const wrong = await client.post<Refusal>('/api/me/password', { current: 'not this one', password: 'five dry rafters' })
    expect([wrong.status, Object.keys(wrong.body.data.fields ?? {})]).toEqual([422, ['current']])
    const same = await client.post<Refusal>('/api/me/password', { current: owner.password, password: owner.password })
    expect([same.status, Object.keys(same.body.data.fields ?? {})]).toEqual([422, ['password']])
    expect((await client.post<Refusal>('/api/me/password', { current: owner.password, password: 'short' })).body.data.fields?.password).toBe('Use at least 10 characters.')
    await signIn(server.url, owner)
  })

  it('stops guessing after ten tries', async () => {
    const { client } = await signUp(server.url)
    const statuses = []
    for (let i = 0; i < 11; i++) statuses.push((await client.post('/api/me/password', { current: `guess ${i}`, password: 'five dry rafters' })).status)
    expect(statuses.at(0)).toBe(422)
    expect(statuses.at(-1)).toBe(429)
  })
})

describe('a forgotten password', () => {
  const ask = (email: string) => createClient(server.url).post('/api/auth/forgotten-password', { email })

  it('is set anew by the mailed link, once; every session ends and this device is signed in', async () => {
    const { client, owner } = await signUp(server.url)
    expect((await ask(owner.email.toUpperCase())).status).toBe(200)
    const token = await newestLink(rows, owner.email, 'reset-password')
    const fresh = createClient(server.url)
    expect((await fresh.get<{ email: string }>(`/api/auth/reset-password/${token}`)).body.email).toBe(owner.email)
    expect((await fresh.post<Refusal>(`/api/auth/reset-password/${token}`, { password: 'short' })).status).toBe(422)
    expect((await fresh.post(`/api/auth/reset-password/${token}`, { password: 'six slow snails' })).status).toBe(200)
    expect((await fresh.get('/api/me')).status).toBe(200)
    expect((await client.get('/api/me')).status).toBe(401)
    await signIn(server.url, { ...owner, password: 'six slow snails' })
    const again = await fresh.post<Refusal>(`/api/auth/reset-password/${token}`, { password: 'seven slow snails' })
    expect([again.status, again.body.data.code]).toEqual([410, 'link-used'])
  })

  it('of two uses of the link at the same moment sets it once', async () => {
    const { owner } = await signUp(server.url)
    await ask(owner.email)
    const token = await newestLink(rows, owner.email, 'reset-password')
    const answers = await Promise.all([1, 2, 3].map(i => createClient(server.url).post(`/api/auth/reset-password/${token}`, { password: `six slow snails ${i}` })))
    expect(answers.map(answer => answer.status).sort()).toEqual([200, 410, 410])
  })

  it('has a link that runs out after an hour, and one that is not ours opens nothing', async () => {
    const { owner } = await signUp(server.url)
    await ask(owner.email)
    const token = await newestLink(rows, owner.email, 'reset-password')
    const kept = await rows.db.selectFrom('passwordReset').innerJoin('appUser', 'appUser.id', 'passwordReset.userId')
      .select(['passwordReset.id', 'tokenHash', 'expiresAt', 'passwordReset.createdAt']).where('email', '=', owner.email).executeTakeFirstOrThrow()
    expect(Date.parse(kept.expiresAt) - Date.parse(kept.createdAt)).toBeCloseTo(3_600_000, -3)
    expect(kept.tokenHash).not.toContain(token)
    await rows.db.updateTable('passwordReset').set({ expiresAt: new Date(Date.now() - 1000).toISOString() }).where('id', '=', kept.id).execute()
    const client = createClient(server.url)
    expect((await client.post<Refusal>(`/api/auth/reset-password/${token}`, { password: 'six slow snails' })).body.data.code).toBe('link-expired')
    for (const unknown of ['x', 'A'.repeat(43), '%00']) expect((await client.get(`/api/auth/reset-password/${unknown}`)).status).toBe(404)
  })

  it('gives the same answer to an address nobody has, and mails nothing there', async () => {
    const { owner } = await signUp(server.url)
    const nobody = inventAddress('nobody')
    const [known, unknown] = [await ask(owner.email), await ask(nobody)]
    expect([unknown.status, unknown.body]).toEqual([known.status, known.body])
    expect(await mailsTo(owner.email)).toHaveLength(1)
    expect(await mailsTo(nobody)).toEqual([])
  })

  it('is answered in the same time whether or not an address exists', async () => {
    const timeOf = async (email: string) => {
      const start = performance.now()
      expect((await ask(email)).status).toBe(200)
      return performance.now() - start
    }
    const known: number[] = []
    const unknown: number[] = []
    for (let i = 0; i < 7; i++) {
      const { owner } = await signUp(server.url)
      known.push(await timeOf(owner.email))
      unknown.push(await timeOf(inventAddress('nobody')))
    }
    const middle = (times: number[]) => [...times].sort((a, b) => a - b)[Math.floor(times.length / 2)]!
    // Both wait for the same moment; what is left over is the noise of a busy machine.
    expect(Math.abs(middle(known) - middle(unknown))).toBeLessThan(40)
    expect(Math.min(...known, ...unknown)).toBeGreaterThan(700)
  })

  it('is mailed at most three times an hour, known or not', async () => {
    for (const email of [(await signUp(server.url)).owner.email, inventAddress('nobody')]) {
      const answers = []
      for (let i = 0; i < 4; i++) answers.push(await ask(email))
      expect(answers.map(answer => answer.status)).toEqual([200, 200, 200, 429])
      expect(Number(answers.at(-1)!.headers.get('retry-after'))).toBeGreaterThan(600)
    }
  })
})

describe('without its database', () => {
  it('signing in, signing up and asking for a link answer 503 with Retry-After, and work again afterwards', async () => {
    const lone = await startServer()
    const { owner } = await signUp(lone.url)
    const client = createClient(lone.url)
    await lone.database.setReachable(false)
    for (const [path, body] of [['sign-in', owner], ['sign-up', { organisationName: owner.organisationName, name: owner.name, email: owner.email }], ['forgotten-password', { email: owner.email }]] as const) {
      const sent = path === 'sign-in' ? { email: owner.email, password: owner.password } : body
      const { status, headers, body: said } = await client.post<Refusal>(`/api/auth/${path}`, sent)
      expect([path, status, said.data.code]).toEqual([path, 503, 'database-away'])
      expect(Number(headers.get('retry-after'))).toBeGreaterThan(0)
    }
    await lone.database.setReachable(true)
    await signIn(lone.url, owner)
    await lone.stop()
  })
})
