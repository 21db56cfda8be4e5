import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Connection } from '../../server/db/connect'
import { verifyChain } from '../../server/db/commands/appendRecord'
import type { InvitationOffer, InvitationRow, PersonRow } from '../../shared/types/invitation'
import type { Me } from '../../shared/types/people'
import { createClient, signIn, signUp, type Client, type NewOwner } from '../support/client'
import { bringIn, inventAddress, lookInto, makeHome, newestLink, tenantTerms, type Refusal } from '../support/people'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
let rows: Connection
let owner: Client
let ownerDetails: NewOwner
let unitId: string
beforeAll(async () => {
  server = await startServer()
  rows = lookInto(server)
  const made = await signUp(server.url)
  owner = made.client
  ownerDetails = made.owner
  unitId = (await makeHome(owner)).unitId
})
afterAll(async () => {
  await rows.close()
  await server.stop()
})

const invite = (input: Record<string, unknown>, by = owner) => by.post<{ id: string } & Refusal>('/api/invitations', input)
const accept = (token: string, body: unknown = { name: 'New Person', password: 'eleven dry gutters' }, client = createClient(server.url)) =>
  client.post<{ startPage: string } & Refusal>(`/api/auth/invitations/${token}`, body)
const rowOf = (id: string) => rows.db.selectFrom('invitation').selectAll().where('id', '=', id).executeTakeFirstOrThrow()
const inFuture = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10)

describe('an invitation', () => {
  it('is mailed, kept for 14 days with only a digest of its link, and recorded', async () => {
    const email = inventAddress('mina')
    const { status, body } = await invite({ email: ` ${email.toUpperCase()}`, role: 'manager' })
    expect(status).toBe(201)
    const row = await rowOf(body.id)
    expect(row).toMatchObject({ email, role: 'manager', unitId: null, acceptedAt: null, revokedAt: null })
    expect(Date.parse(row.expiresAt) - Date.parse(row.createdAt)).toBeCloseTo(14 * 86_400_000, -4)
    expect(row.tokenHash).not.toContain(await newestLink(rows, email, 'invitation'))
    const mail = await rows.db.selectFrom('message').selectAll().where('toAddress', '=', email).executeTakeFirstOrThrow()
    expect(mail).toMatchObject({ mailClass: 'account', organisationId: null, subject: `${ownerDetails.organisationName} invites you to Lathkey` })
    const { body: list } = await owner.get<{ rows: InvitationRow[] }>('/api/invitations')
    expect(list.rows.find(({ id }) => id === body.id)).toMatchObject({ email, role: 'manager', state: 'open', invitedByName: ownerDetails.name })
    const { body: me } = await owner.get<Me>('/api/me')
    expect((await verifyChain(rows.db, me.organisation.id)).kind).toBe('unbroken')
  })

  it('tells its reader who invites them to what, before anything is accepted', async () => {
    const email = inventAddress('tenant')
    const other = await makeHome(owner, 'Number 6')
    await invite({ email, role: 'tenant', ...tenantTerms(other.unitId) })
    const { body } = await createClient(server.url).get<InvitationOffer>(`/api/auth/invitations/${await newestLink(rows, email, 'invitation')}`)
    expect(body).toMatchObject({
      organisationName: ownerDetails.organisationName, inviterName: ownerDetails.name, email, role: 'tenant',
      unit: { name: 'Number 6', propertyName: 'Invented Row' }, accountExists: false, signedInAs: null,
    })
  })

  it.each(['manager', 'trades', 'owner'] as const)('lets a new %s in with that role', async (role) => {
    const { client } = await bringIn(server, rows, owner, role)
    const { body: me } = await client.get<Me>('/api/me')
    expect(me.organisation.role).toBe(role)
    expect(me.unitIds).toEqual(role === 'trades' ? [] : null)
  })

  it('for a tenant makes the tenancy and opens that home only', async () => {
    const home = await makeHome(owner, 'Number 8')
    const { client, email } = await bringIn(server, rows, owner, 'tenant', tenantTerms(home.unitId, { endsOn: inFuture(300) }))
    expect((await client.get<Me>('/api/me')).body.unitIds).toEqual([home.unitId])
    expect((await client.get(`/api/units/${home.unitId}`)).status).toBe(200)
    expect((await client.get(`/api/units/${unitId}`)).status).toBe(404)
    const { body: people } = await owner.get<{ rows: PersonRow[] }>(`/api/people?search=${email}`)
    expect(people.rows[0]).toMatchObject({ role: 'tenant', units: [{ id: home.unitId, name: 'Number 8', untilOn: inFuture(300) }] })
    const actions = await rows.db.selectFrom('recordEntry').select('action').where('unitId', '=', home.unitId).orderBy('seq').execute()
    expect(actions.map(({ action }) => action)).toEqual(expect.arrayContaining(['tenancy added', 'invitation sent', 'tenant came in']))
  })

  it('for a second tenant uses the tenancy that is there', async () => {
    const home = await makeHome(owner, 'Number 10')
    await bringIn(server, rows, owner, 'tenant', tenantTerms(home.unitId))
    const { id } = await rows.db.selectFrom('tenancy').select('id').where('unitId', '=', home.unitId).executeTakeFirstOrThrow()
    const { client } = await bringIn(server, rows, owner, 'tenant', { unitId: home.unitId, tenancyId: id })
    expect((await client.get<Me>('/api/me')).body.unitIds).toEqual([home.unitId])
    expect(await rows.db.selectFrom('tenancyPerson').select('userId').where('tenancyId', '=', id).execute()).toHaveLength(2)
  })

  it('that names no tenancy (an old row) uses the one that runs, else makes one from today', async () => {
    const home = await makeHome(owner, 'Number 12')
    const email = inventAddress('tenant')
    const { body } = await invite({ email, role: 'tenant', ...tenantTerms(home.unitId) })
    const { tenancyId } = await rowOf(body.id)
    await rows.db.updateTable('invitation').set({ tenancyId: null }).where('id', '=', body.id).execute()
    await rows.db.deleteFrom('tenancy').where('id', '=', tenancyId!).execute()
    expect((await accept(await newestLink(rows, email, 'invitation'))).status).toBe(200)
    const made = await rows.db.selectFrom('tenancy').select(['tenantName', 'endsOn']).where('unitId', '=', home.unitId).executeTakeFirst()
    expect(made).toEqual({ tenantName: 'New Person', endsOn: null })
  })

  it('for an engineer opens one home until its last day', async () => {
    const { client, email } = await bringIn(server, rows, owner, 'engineer', { unitId, untilOn: inFuture(30) })
    expect((await client.get<Me>('/api/me')).body.unitIds).toEqual([unitId])
    expect((await client.get(`/api/units/${unitId}`)).status).toBe(200)
    await rows.db.updateTable('unitAccess').set({ untilOn: inFuture(-2) })
      .where('userId', '=', eb => eb.selectFrom('appUser').select('id').where('email', '=', email)).execute()
    expect((await client.get<Me>('/api/me')).body.unitIds).toEqual([])
    expect((await client.get(`/api/units/${unitId}`)).status).toBe(404)
  })

  it.each([
    ['tenant', '/my-home'], ['trades', '/upkeep'], ['manager', '/overview'], ['engineer', 'the unit'],
  ] as const)('leads a %s to %s', async (role, startPage) => {
    const email = inventAddress(role)
    const home = await makeHome(owner, `For ${role}`)
    await invite({ email, role, ...(role === 'tenant' ? tenantTerms(home.unitId) : role === 'engineer' ? { unitId: home.unitId, untilOn: inFuture(5) } : {}) })
    const { body } = await accept(await newestLink(rows, email, 'invitation'))
    expect(body.startPage).toBe(startPage === 'the unit' ? `/units/${home.unitId}` : startPage)
  })
})

describe('somebody who has an account', () => {
  it('accepts signed in as that address only, without a new password', async () => {
    const { owner: known } = await signUp(server.url)
    await invite({ email: known.email, role: 'trades' })
    const token = await newestLink(rows, known.email, 'invitation')
    expect((await createClient(server.url).get<InvitationOffer>(`/api/auth/invitations/${token}`)).body.accountExists).toBe(true)
    const stranger = await accept(token, { name: 'Impostor', password: 'take it over now' })
    expect([stranger.status, stranger.body.data.code]).toEqual([401, 'sign-in-first'])
    const { client: somebodyElse } = await signUp(server.url)
    expect((await accept(token, {}, somebodyElse)).status).toBe(401)
    const client = await signIn(server.url, known)
    expect((await accept(token, {}, client)).body.startPage).toBe('/upkeep')
    const { body: me } = await client.get<Me>('/api/me')
    expect(me.organisation).toMatchObject({ name: ownerDetails.organisationName, role: 'trades' })
    expect(me.organisations).toHaveLength(2)
  })

  it('may be let into one more home, but has one role', async () => {
    const { client, email } = await bringIn(server, rows, owner, 'engineer', { unitId, untilOn: inFuture(30) })
    const second = await makeHome(owner, 'Number 20')
    expect((await invite({ email, role: 'engineer', unitId: second.unitId, untilOn: inFuture(30) })).status).toBe(201)
    expect((await accept(await newestLink(rows, email, 'invitation'), {}, client)).status).toBe(200)
    expect([...(await client.get<Me>('/api/me')).body.unitIds!].sort()).toEqual([unitId, second.unitId].sort())
    const refused = await invite({ email, role: 'manager' })
    expect([refused.status, refused.body.data.code]).toEqual([409, 'already-member'])
    expect(refused.body.data.fields?.email).toMatch(/is here already, as an engineer/)
  })
})

describe('the link of an invitation', () => {
  const invited = async () => {
    const email = inventAddress('someone')
    const { body } = await invite({ email, role: 'trades' })
    return { id: body.id, email, token: await newestLink(rows, email, 'invitation') }
  }

  it('works once, also when used three times at the same moment', async () => {
    const { token, email } = await invited()
    const answers = await Promise.all([1, 2, 3].map(() => accept(token)))
    expect(answers.map(answer => answer.status).sort()).toEqual([200, expect.any(Number), expect.any(Number)])
    for (const { status } of answers.filter(answer => answer.status !== 200)) expect([401, 409, 410]).toContain(status)
    expect(await rows.db.selectFrom('membership').innerJoin('appUser', 'appUser.id', 'membership.userId').select('membership.id').where('email', '=', email).execute()).toHaveLength(1)
    expect((await accept(token)).body.data.code).toBe('link-used')
  })

  it('runs out after 14 days, and sending again renews it by a new link', async () => {
    const { id, email, token } = await invited()
    await rows.db.updateTable('invitation').set({ expiresAt: new Date(Date.now() - 1000).toISOString() }).where('id', '=', id).execute()
    expect((await accept(token)).body.data.code).toBe('link-expired')
    expect((await owner.get<{ rows: InvitationRow[] }>('/api/invitations')).body.rows.find(row => row.id === id)?.state).toBe('expired')
    expect((await owner.post(`/api/invitations/${id}/send`)).status).toBe(200)
    const second = await newestLink(rows, email, 'invitation')
    expect(second).not.toBe(token)
    expect((await accept(token)).body.data.code).toBe('link-unknown')
    expect((await accept(second)).status).toBe(200)
    expect((await owner.post<Refusal>(`/api/invitations/${id}/send`)).body.data.code).toBe('already-settled')
  })

  it('closes at once when the invitation is taken back', async () => {
    const { id, token } = await invited()
    expect((await owner.remove(`/api/invitations/${id}`)).status).toBe(200)
    expect((await createClient(server.url).get<Refusal>(`/api/auth/invitations/${token}`)).body.data.code).toBe('link-revoked')
    expect((await accept(token)).status).toBe(410)
    expect((await owner.get<{ rows: InvitationRow[] }>('/api/invitations')).body.rows.find(row => row.id === id)).toBeUndefined()
  })

  it('opens nothing when it is not ours, and needs a name and a password from a new person', async () => {
    for (const token of ['x', 'A'.repeat(43)]) expect((await accept(token)).status).toBe(404)
    const { token } = await invited()
    expect(Object.keys((await accept(token, {})).body.data.fields ?? {}).sort()).toEqual(['name', 'password'])
    expect((await accept(token, { name: 'X', password: 'short' })).status).toBe(422)
  })

  it('is sent again at most five times a day', async () => {
    const { id } = await invited()
    const statuses = []
    for (let i = 0; i < 6; i++) statuses.push((await owner.post(`/api/invitations/${id}/send`)).status)
    expect(statuses).toEqual([200, 200, 200, 200, 200, 429])
  })
})

describe('who may invite', () => {
  it('is refused to people who are not signed in, to strangers and to small roles', async () => {
    const { body } = await invite({ email: inventAddress('x'), role: 'trades' })
    const { client: stranger } = await signUp(server.url)
    const home = await makeHome(owner, 'Number 30')
    const { client: tenant } = await bringIn(server, rows, owner, 'tenant', tenantTerms(home.unitId))
    const nobody = createClient(server.url)
    expect((await invite({ email: inventAddress('x'), role: 'trades' }, nobody)).status).toBe(401)
    expect((await invite({ email: inventAddress('x'), role: 'trades' }, tenant)).status).toBe(403)
    expect((await nobody.get('/api/invitations')).status).toBe(401)
    expect((await tenant.get('/api/invitations')).status).toBe(403)
    for (const [client, status] of [[nobody, 401], [stranger, 404], [tenant, 404]] as const) {
      expect((await client.post(`/api/invitations/${body.id}/send`)).status).toBe(status)
      expect((await client.remove(`/api/invitations/${body.id}`)).status).toBe(status)
    }
    expect((await rowOf(body.id)).revokedAt).toBeNull()
  })

  it('lets managers invite, but not owners, nor touch the invitation of one', async () => {
    const { client: manager } = await bringIn(server, rows, owner, 'manager')
    expect((await invite({ email: inventAddress('m'), role: 'manager' }, manager)).status).toBe(201)
    const refused = await invite({ email: inventAddress('o'), role: 'owner' }, manager)
    expect([refused.status, refused.body.data.code]).toEqual([403, 'owners-only'])
    const { body } = await invite({ email: inventAddress('o'), role: 'owner' })
    expect((await manager.post(`/api/invitations/${body.id}/send`)).status).toBe(403)
    expect((await manager.remove(`/api/invitations/${body.id}`)).status).toBe(403)
  })
})

describe('unsound invitations', () => {
  it('are refused at their fields', async () => {
    const fieldsOf = async (input: Record<string, unknown>) => Object.keys((await invite(input)).body.data.fields ?? {}).sort()
    const email = inventAddress('x')
    expect(await fieldsOf({})).toEqual(['email', 'role'])
    expect(await fieldsOf({ email, role: 'tenant' })).toEqual(['startsOn', 'tenantName', 'unitId'])
    expect(await fieldsOf({ email, role: 'engineer', unitId })).toEqual(['untilOn'])
    expect(await fieldsOf({ email, role: 'engineer', unitId, untilOn: inFuture(-3) })).toEqual(['untilOn'])
  })

  it('cannot name a home or a tenancy of somebody else', async () => {
    const { client: stranger } = await signUp(server.url)
    const theirs = await makeHome(stranger)
    const email = inventAddress('x')
    expect(Object.keys((await invite({ email, role: 'tenant', ...tenantTerms(theirs.unitId) })).body.data.fields ?? {})).toEqual(['unitId'])
    const tenancy = await stranger.post<{ id: string }>(`/api/units/${theirs.unitId}/tenancies`, { tenantName: 'Theirs', startsOn: '2020-01-01' })
    expect(Object.keys((await invite({ email, role: 'tenant', unitId, tenancyId: tenancy.body.id })).body.data.fields ?? {})).toEqual(['tenancyId'])
  })

  it('are not sent twice to one address, and a tenancy that overlaps is refused with nothing kept', async () => {
    const email = inventAddress('twice')
    await invite({ email, role: 'trades' })
    expect((await invite({ email, role: 'trades' })).body.data.code).toBe('already-invited')
    const home = await makeHome(owner, 'Number 40')
    await invite({ email: inventAddress('first'), role: 'tenant', ...tenantTerms(home.unitId) })
    const second = inventAddress('second')
    const { status, body } = await invite({ email: second, role: 'tenant', ...tenantTerms(home.unitId) })
    expect([status, body.data.code, Object.keys(body.data.fields ?? {})]).toEqual([409, 'overlaps', ['startsOn']])
    expect(await rows.db.selectFrom('invitation').select('id').where('email', '=', second).execute()).toEqual([])
  })
})
