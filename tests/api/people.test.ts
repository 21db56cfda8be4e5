import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Connection } from '../../server/db/connect'
import { addUser, joinOrganisation } from '../../server/db/commands/addPerson'
import type { PersonRow } from '../../shared/types/invitation'
import type { Me } from '../../shared/types/people'
import { begin, createClient, signUp, type Client } from '../support/client'
import { bringIn, inventAddress, lookInto, makeHome, newestLink, tenantTerms, type Refusal } from '../support/people'
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

interface People { rows: PersonRow[], next: string | null }
const peopleOf = async (client: Client, query = '') => (await client.get<People>(`/api/people${query}`)).body
const rowOf = async (client: Client, email: string) => (await peopleOf(client, `?search=${email}`)).rows[0]!

describe('the list of people', () => {
  it('shows who is here with role and homes, and finds by name, address and role', async () => {
    const { client: owner, owner: details } = await signUp(server.url)
    const { unitId } = await makeHome(owner)
    const tenant = await bringIn(server, rows, owner, 'tenant', tenantTerms(unitId))
    await bringIn(server, rows, owner, 'trades')
    expect((await peopleOf(owner)).rows.map(({ role }) => role).sort()).toEqual(['owner', 'tenant', 'trades'])
    expect((await peopleOf(owner, '?role=tenant')).rows).toMatchObject([{ email: tenant.email, units: [{ id: unitId }], mayEnd: true }])
    expect((await peopleOf(owner, `?search=${encodeURIComponent(details.name.toUpperCase())}`)).rows).toMatchObject([{ email: details.email, mayEnd: false }])
    expect((await peopleOf(owner, '?search=%25')).rows).toEqual([])
  })

  it('comes in pages of 50, each person once, in the order of names', async () => {
    const { client: owner } = await signUp(server.url)
    const { body: me } = await owner.get<Me>('/api/me')
    await rows.db.transaction().execute(async (trx) => {
      for (let i = 0; i < 120; i++) {
        const user = await addUser(trx, { email: inventAddress('many'), name: i % 3 === 0 ? 'Same Name' : `Person ${i}`, passwordHash: 'none' })
        await joinOrganisation(trx, { userId: me.user.id, name: me.user.name }, { organisationId: me.organisation.id, user, role: 'trades' })
      }
    })
    const pages: PersonRow[][] = []
    let after: string | null = ''
    while (after !== null) {
      const page: People = await peopleOf(owner, after ? `?after=${after}` : '')
      pages.push(page.rows)
      after = page.next
    }
    expect(pages.map(page => page.length)).toEqual([50, 50, 21])
    const all = pages.flat()
    expect(new Set(all.map(({ id }) => id)).size).toBe(121)
    const names = all.map(({ name }) => name.toLowerCase())
    expect(names).toEqual([...names].sort())
    expect((await owner.get('/api/people?after=nonsense')).status).toBe(422)
    expect((await owner.get('/api/people?role=admin')).status).toBe(422)
  })

  it('is closed to people who are not signed in and to small roles', async () => {
    const { client: owner } = await signUp(server.url)
    const { client: trades } = await bringIn(server, rows, owner, 'trades')
    expect((await createClient(server.url).get('/api/people')).status).toBe(401)
    expect((await trades.get('/api/people')).status).toBe(403)
  })
})

describe('ending access', () => {
  it('works at once, keeps the person elsewhere, and is recorded', async () => {
    const { client: owner } = await signUp(server.url)
    const { unitId } = await makeHome(owner)
    const tenant = await bringIn(server, rows, owner, 'tenant', tenantTerms(unitId))
    const { id, userId } = await rowOf(owner, tenant.email)
    expect((await owner.remove(`/api/people/${id}`)).status).toBe(200)
    const answer = await tenant.client.get<Refusal>('/api/me')
    expect([answer.status, answer.body.data.code]).toEqual([403, 'no-membership'])
    expect((await tenant.client.get(`/api/units/${unitId}`)).status).toBe(404)
    expect((await peopleOf(owner, `?search=${tenant.email}`)).rows).toEqual([])
    expect(await rows.db.selectFrom('tenancyPerson').select('tenancyId').where('userId', '=', userId).execute()).toEqual([])
    const entry = await rows.db.selectFrom('recordEntry').select(['action', 'before']).where('subjectId', '=', userId).where('unitId', 'is', null).orderBy('seq', 'desc').executeTakeFirst()
    expect(entry).toMatchObject({ action: 'access ended', before: { role: 'tenant', name: tenant.name } })
    expect((await owner.remove(`/api/people/${id}`)).status).toBe(404)
  })

  it('leaves somebody without an organisation on a page that says so and signs out', async () => {
    const { client: owner } = await signUp(server.url)
    const trades = await bringIn(server, rows, owner, 'trades')
    await owner.remove(`/api/people/${(await rowOf(owner, trades.email)).id}`)
    const sent = await trades.client.send('/account')
    expect([sent.status, sent.headers.get('location')]).toEqual([302, '/no-membership'])
    expect(await (await trades.client.send('/no-membership')).text()).toContain('You are not part of an organisation just now')
  })

  it('falls back to another organisation of theirs', async () => {
    const { client: owner } = await signUp(server.url)
    const manager = await bringIn(server, rows, owner, 'manager')
    await begin(manager.client, { ...manager, organisationName: 'Own House' })
    const { body: me } = await manager.client.get<Me>('/api/me')
    await manager.client.post('/api/me/organisation', { organisationId: me.organisations.find(({ role }) => role === 'manager')!.id })
    await owner.remove(`/api/people/${(await rowOf(owner, manager.email)).id}`)
    expect((await manager.client.get<Me>('/api/me')).body.organisation.name).toBe('Own House')
  })

  it('can be undone by a new invitation, which opens only what it says', async () => {
    const { client: owner } = await signUp(server.url)
    const [first, second] = [await makeHome(owner, 'One'), await makeHome(owner, 'Two')]
    const tenant = await bringIn(server, rows, owner, 'tenant', tenantTerms(first.unitId))
    await owner.remove(`/api/people/${(await rowOf(owner, tenant.email)).id}`)
    await owner.post('/api/invitations', { email: tenant.email, role: 'tenant', ...tenantTerms(second.unitId) })
    const token = await newestLink(rows, tenant.email, 'invitation')
    expect((await tenant.client.post(`/api/auth/invitations/${token}`, {})).status).toBe(200)
    expect((await tenant.client.get<Me>('/api/me')).body.unitIds).toEqual([second.unitId])
  })

  it('never leaves an organisation without an owner, also when two owners end each other at the same moment', async () => {
    const { client: owner, owner: details } = await signUp(server.url)
    const own = await rowOf(owner, details.email)
    const refused = await owner.remove<Refusal>(`/api/people/${own.id}`)
    expect([refused.status, refused.body.data.code]).toEqual([409, 'last-owner'])
    const second = await bringIn(server, rows, owner, 'owner')
    const other = await rowOf(owner, second.email)
    const answers = await Promise.all([owner.remove(`/api/people/${other.id}`), second.client.remove(`/api/people/${own.id}`)])
    expect(answers.filter(answer => answer.status === 200)).toHaveLength(1)
    const owners = await rows.db.selectFrom('membership').select('id').where('id', 'in', [own.id, other.id]).where('endedAt', 'is', null).execute()
    expect(owners).toHaveLength(1)
  })

  it('of an owner is for owners, and of anybody for people who manage people there', async () => {
    const { client: owner, owner: details } = await signUp(server.url)
    const manager = await bringIn(server, rows, owner, 'manager')
    const trades = await bringIn(server, rows, owner, 'trades')
    const own = await rowOf(owner, details.email)
    const refused = await manager.client.remove<Refusal>(`/api/people/${own.id}`)
    expect([refused.status, refused.body.data.code]).toEqual([403, 'owners-only'])
    expect((await rowOf(manager.client, details.email)).mayEnd).toBe(false)
    const { client: stranger } = await signUp(server.url)
    expect((await stranger.remove(`/api/people/${own.id}`)).status).toBe(404)
    expect((await trades.client.remove(`/api/people/${own.id}`)).status).toBe(404)
    expect((await createClient(server.url).remove(`/api/people/${own.id}`)).status).toBe(401)
    expect((await manager.client.remove(`/api/people/${(await rowOf(owner, trades.email)).id}`)).status).toBe(200)
  })
})
