import { setTimeout as wait } from 'node:timers/promises'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { queueMessage } from '../../../server/db/commands/queueMessage'
import { newId } from '../../../server/utils/newId'
import type { OrganisationSettings } from '../../../shared/types/organisation'
import type { MessageRow, Reviews } from '../../../shared/types/review'
import { addItem, addSurvey, emailOf, today } from './inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from './openHome'

let open: OpenServer
let home: OpenHome

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
})
afterAll(() => open.close())

async function until<T>(look: () => Promise<T | undefined>, ms = 20_000): Promise<T> {
  const deadline = Date.now() + ms
  for (;;) {
    const found = await look()
    if (found !== undefined) return found
    if (Date.now() > deadline) throw new Error('It did not happen in time.')
    await wait(100)
  }
}

const finishedRun = (client: OpenHome['as']['owner'], runId: string) => until(async () =>
  (await client.get<Reviews>('/api/reviews')).body.runs.find(run => run.id === runId && run.finishedAt !== null))

describe('the organisation’s settings', () => {
  const edit = async (changes: object = {}) => {
    const { body } = await home.as.owner.get<OrganisationSettings>('/api/organisation')
    const { id, currency, isDemo, abilities, ...values } = body
    expect([id, currency, isDemo, abilities.length > 0]).toEqual([home.organisationId, 'USD', false, true])
    return { ...values, ...changes }
  }

  it('are seen by staff and changed by owners alone, with a record entry', async () => {
    const answer = await home.as.owner.patch<OrganisationSettings>('/api/organisation', await edit({ name: 'Plumbline and Daughters', reviewHour: 7, urgentResponseHours: 48, seasonAllowanceMm: 2 }))
    expect(answer.status).toBe(200)
    expect(answer.body).toMatchObject({ name: 'Plumbline and Daughters', reviewHour: 7, urgentResponseHours: 48, seasonAllowanceMm: 2, version: 2 })
    expect(await open.db.selectFrom('recordEntry').select(['action', 'after']).where('chainId', '=', home.organisationId).orderBy('seq', 'desc').limit(1).executeTakeFirst())
      .toMatchObject({ action: 'settings changed', after: { reviewHour: 7 } })
    expect((await home.as.manager.get<OrganisationSettings>('/api/organisation')).body.name).toBe('Plumbline and Daughters')
    expect((await home.as.manager.patch('/api/organisation', await edit())).status).toBe(403)
    expect((await home.as.tenant.get('/api/organisation')).status).toBe(403)
    expect((await home.as.nobody.get('/api/organisation')).status).toBe(401)
    expect((await home.as.nobody.patch('/api/organisation', {})).status).toBe(401)
  })

  it('refuse what cannot be', async () => {
    const fieldsOf = async (changes: object) => Object.keys((await home.as.owner.patch<Refusal>('/api/organisation', await edit(changes))).body.data?.fields ?? {})
    expect(await fieldsOf({ timeZone: 'Middle/Earth' })).toEqual(['timeZone'])
    expect(await fieldsOf({ timeZone: '+02:00' })).toEqual(['timeZone'])
    expect(await fieldsOf({ reviewHour: 24 })).toEqual(['reviewHour'])
    expect(await fieldsOf({ routineResponseDays: 0.5 })).toEqual(['routineResponseDays'])
    expect(await fieldsOf({ dangerResponseHours: 100, urgentResponseHours: 50 })).toEqual(['urgentResponseHours'])
    expect(await fieldsOf({ seasonAllowanceMm: -1 })).toEqual(['seasonAllowanceMm'])
    expect((await home.as.owner.patch('/api/organisation', await edit({ version: 99 }))).status).toBe(409)
  })
})

describe('a review by hand', () => {
  it('runs once however often it is asked for, reaches its people by mail, and shows what it did', async () => {
    await addSurvey(open.db, home)
    await addItem(open.db, home, 4000)
    const asked = await Promise.all([1, 2, 3].map(() => home.as.owner.post<{ runId: string, isNew: boolean }>('/api/reviews')))
    expect(asked.map(answer => answer.status)).toEqual([202, 202, 202])
    expect(asked.filter(answer => answer.body.isNew)).toHaveLength(1)
    expect(new Set(asked.map(answer => answer.body.runId)).size).toBe(1)
    const run = await finishedRun(home.as.manager, asked[0]!.body.runId)
    expect(run).toMatchObject({ error: null, askedByName: 'Oona', counts: { units: 1, unitsDone: 1, digests: 2 } })
    const message = await open.server.mail.waitForMessage(await emailOf(open.db, home.manager), { subject: /need/ })
    expect(message.text).toContain('Attic near its rating')

    const again = await home.as.manager.post<{ runId: string, isNew: boolean }>('/api/reviews')
    expect(again.body.isNew).toBe(true)
    expect(await finishedRun(home.as.manager, again.body.runId)).toMatchObject({ counts: { digests: 0 } })
    await wait(500)
    expect(open.server.mail.messagesTo(await emailOf(open.db, home.manager)).filter(sent => /need/.test(sent.subject))).toHaveLength(1)
  })

  it('is for owners and managers', async () => {
    for (const client of [home.as.tenant, home.as.trades]) {
      expect((await client.post('/api/reviews')).status).toBe(403)
      expect((await client.get('/api/reviews')).status).toBe(403)
    }
    expect((await home.as.nobody.post('/api/reviews')).status).toBe(401)
    expect((await home.as.nobody.get('/api/reviews')).status).toBe(401)
  })

  it('says when the next comes by itself', async () => {
    const { body } = await home.as.owner.get<Reviews>('/api/reviews')
    expect(body.next).toMatchObject({ hour: 7, timeZone: 'UTC' })
    expect([today(), today(1)]).toContain(body.next.on)
  })
})

describe('messages', () => {
  const queue = (toAddress: string) => open.db.transaction().execute(trx => queueMessage(trx, {
    organisationId: home.organisationId, userId: null, kind: 'invitation', mailClass: 'account', toAddress, dedupeKey: newId(),
    content: { subject: 'Come and see', heading: 'You are invited', paragraphs: ['Private link'], footer: [] },
  }))
  const rows = async (query = '') => (await home.as.owner.get<{ rows: MessageRow[] }>(`/api/messages${query}`)).body.rows

  it('shows staff what was sent and what failed and why, never the words, and sends a failed one again', async () => {
    const toAddress = `${newId()}@plumbline.example`
    open.server.mail.setMode('bounce', { recipients: [toAddress] })
    const id = await queue(toAddress)
    await home.as.owner.post('/api/reviews')
    const failed = await until(async () => (await rows('?state=failed')).find(message => message.id === id), 70_000)
    expect(failed).toMatchObject({ toAddress, lastError: expect.stringContaining('550'), sentAt: null })
    expect(JSON.stringify(failed)).not.toContain('Private link')

    open.server.mail.setMode('accept')
    expect((await home.as.stranger.post(`/api/messages/${id}/sending`)).status).toBe(404)
    expect((await home.as.otherTenant.post(`/api/messages/${id}/sending`)).status).toBe(404)
    expect((await home.as.nobody.post(`/api/messages/${id}/sending`)).status).toBe(401)
    const again = await home.as.manager.post(`/api/messages/${id}/sending`)
    expect(again).toMatchObject({ status: 200, body: { id, state: 'queued' } })
    await open.server.mail.waitForMessage(toAddress)
    await until(async () => (await rows('?state=sent')).find(message => message.id === id))
    expect((await home.as.manager.post<Refusal>(`/api/messages/${id}/sending`)).body.data.code).toBe('not-failed')
    expect(open.server.mail.messagesTo(toAddress)).toHaveLength(1)
  }, 120_000)

  it('are for staff of the organisation', async () => {
    expect((await home.as.tenant.get('/api/messages')).status).toBe(403)
    expect((await home.as.nobody.get('/api/messages')).status).toBe(401)
    expect((await home.as.owner.get('/api/messages?state=lost')).status).toBe(422)
    expect((await home.as.stranger.get<{ rows: MessageRow[] }>('/api/messages')).body.rows).toEqual([])
  })
})
