import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { verifyChain } from '../../../server/db/commands/appendRecord'
import type { ListImported, ListPreview } from '../../../shared/types/inventoryList'
import type { PhotoRef } from '../../../shared/types/photo'
import type { TermsPage } from '../../../shared/types/storageTerms'
import { addDays } from '../../../shared/utils/days'
import type { Client } from '../../support/client'
import { drawnPhoto, photoForm, plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
import { startServer, type TestServer } from '../../support/server'
import { item, newAttic, type Refusal } from './atticInputs'

let server: TestServer
let home: CeilingHome
beforeAll(async () => {
  server = await startServer()
  home = await plantCeilingHome(server)
})
afterAll(async () => {
  await home?.close()
  await server?.stop()
})

async function surveyed() {
  const attic = await newAttic(home)
  await attic.survey({ surveyedOn: addDays(home.today, -100) })
  return attic
}
/** What each kind of asker gets who may not. */
async function refusals(ask: (client: Client) => Promise<{ status: number }>, small: Client) {
  return Promise.all([home.nobody, home.stranger, home.neighbour, small].map(async client => (await ask(client)).status))
}
const csv = (...rows: string[]) => ['name,weight_lb,length_ft,width_ft,there_since', ...rows].join('\n')
const key = () => ({ headers: { 'idempotency-key': randomUUID() } })

describe('a list as a file', () => {
  it('goes out in the units asked for and comes back as it was', async () => {
    const attic = await surveyed()
    await attic.put({ name: 'Books, old', notes: '=risky', weightSource: 'weighed', lowLb: 33.3, typicalLb: 33.3, highLb: 33.3 })
    const out = await home.owner.send(`${attic.path}/inventory`)
    expect([out.status, out.headers.get('content-type'), out.headers.get('content-disposition')]).toEqual([200, 'text/csv; charset=utf-8', 'attachment; filename="stored-in-attic.csv"'])
    const other = await surveyed()
    const { body } = await home.owner.post<ListImported>(`${other.path}/inventory-import`, { csv: await out.text(), skipBad: false }, key())
    expect(body).toEqual({ items: 1, skipped: 0 })
    const facts = ({ name, notes, typicalLb, xFt, yFt, placedOn, belongsTo, quantity }: Awaited<ReturnType<typeof attic.read>>['items'][number]) => ({ name, notes, typicalLb, xFt, yFt, placedOn, belongsTo, quantity })
    expect((await other.read()).items.map(facts)).toEqual((await attic.read()).items.map(facts))
    expect(await (await home.owner.send(`${attic.path}/inventory?units=metric`)).text()).toContain('weight_kg')
  })

  it('is looked at first and stores nothing then', async () => {
    const attic = await surveyed()
    const { status, body } = await home.owner.post<ListPreview>(`${attic.path}/inventory-preview`, { csv: csv('Good,20,2,2,', 'Bad,x,2,2,') })
    expect([status, body.good, body.bad, body.rows[1]!.problems[0]!.column]).toEqual([200, 1, 1, 'weight_lb'])
    expect((await attic.read()).items).toEqual([])
  })

  it('is read in whole or not at all, unless bad rows are left out knowingly', async () => {
    const attic = await surveyed()
    const send = (skipBad: boolean, options = key()) => home.owner.post<ListImported & Refusal>(`${attic.path}/inventory-import`, { csv: csv('Good,20,2,2,', 'Bad,x,2,2,', 'Also good,30,2,2,2026-01-05'), skipBad }, options)
    const refused = await send(false)
    expect([refused.status, refused.body.data.fields?.csv]).toEqual([422, '1 row is not right yet. Nothing was read in.'])
    expect((await attic.read()).items).toEqual([])
    const once = key()
    const [first, again] = [await send(true, once), await send(true, once)]
    expect([first.body, again.body]).toEqual([{ items: 2, skipped: 1 }, { items: 2, skipped: 1 }])
    const { items, events } = await attic.read()
    expect(items.map(one => one.name).sort()).toEqual(['Also good', 'Good'])
    expect(events.map(event => event.happenedOn)).toEqual([home.today, '2026-01-05'])
    expect(await attic.rows.actions()).toContain('list read in')
    expect(await verifyChain(home.db, home.unitId)).toMatchObject({ kind: 'unbroken' })
    const other = await surveyed()
    expect((await home.owner.post<Refusal>(`${other.path}/inventory-import`, { csv: csv('Good,20,2,2,'), skipBad: false }, once)).body.data.code).toBe('key-used')
  })

  it('is for those who run the home', async () => {
    const attic = await surveyed()
    expect(await refusals(client => client.post(`${attic.path}/inventory-preview`, { csv: csv('A,1,1,1,') }), home.tenant)).toEqual([401, 404, 404, 403])
    expect(await refusals(client => client.post(`${attic.path}/inventory-import`, { csv: csv('A,1,1,1,'), skipBad: false }, key()), home.tenant)).toEqual([401, 404, 404, 403])
    expect(await refusals(client => client.get(`${attic.path}/inventory`), home.trades)).toEqual([401, 404, 404, 404])
    expect((await home.owner.post<Refusal>(`${attic.path}/inventory-import`, { csv: csv('A,1,1,1,'), skipBad: false })).body.data.code).toBe('idempotency-key-needed')
    expect((await home.owner.post(`${attic.path}/inventory-preview`, { csv: 7 })).status).toBe(422)
  })
})

describe('several things at once', () => {
  it('are taken out or given over together, each with its own step and entry', async () => {
    const attic = await surveyed()
    for (const name of ['One', 'Two', 'Three']) await attic.put({ name })
    const refs = async () => (await attic.read()).items.map(({ id: itemId, version }) => ({ itemId, version }))
    const bulk = async (change: object, items?: object[]) => home.owner.post<Refusal & { changed: number }>(`${attic.path}/bulk`, { items: items ?? await refs(), change })
    expect((await bulk({ kind: 'owner', belongsTo: 'landlord' })).body).toEqual({ changed: 3 })
    expect(new Set((await attic.read()).items.map(one => one.belongsTo))).toEqual(new Set(['landlord']))
    const [one, two] = await refs()
    expect((await bulk({ kind: 'take-out', removedOn: home.today }, [one!, two!])).body).toEqual({ changed: 2 })
    expect((await attic.rows.events()).map(event => event.kind)).toEqual(['in', 'in', 'in', 'out', 'out'])
    expect((await attic.rows.status())?.storedLb).toBe(60)
  })

  it('are left alone when one of them changed meanwhile, is elsewhere or the day is to come', async () => {
    const attic = await surveyed()
    await attic.put({ name: 'One' })
    const { body: other } = await (await surveyed()).put()
    const [first] = (await attic.read()).items
    const bulk = (items: object[], removedOn = home.today) => home.owner.post<Refusal>(`${attic.path}/bulk`, { items, change: { kind: 'take-out', removedOn } })
    const mine = { itemId: first!.id, version: first!.version }
    expect((await bulk([{ ...mine, version: 9 }])).body.data.code).toBe('changed-meanwhile')
    expect((await bulk([mine, { itemId: other.id, version: 1 }])).status).toBe(404)
    expect((await bulk([mine], addDays(home.today, 1))).body.data.fields).toHaveProperty('removedOn')
    expect((await bulk([])).status).toBe(422)
    expect((await attic.read()).items).toHaveLength(1)
    expect(await refusals(client => client.post(`${attic.path}/bulk`, { items: [mine], change: { kind: 'take-out', removedOn: home.today } }), home.tenant)).toEqual([401, 404, 404, 403])
  })
})

describe('what does not belong in an attic', () => {
  it('is noted only with the reason why it is there', async () => {
    const attic = await surveyed()
    const tiles = { name: 'Tiles', catalogueKey: 'ceramic-tile-box-for-10-ft2', xFt: 0 }
    expect((await attic.put(tiles)).body.data.fields).toHaveProperty('keptDespite')
    const { body } = await attic.put({ ...tiles, keptDespite: 'Comes down in May.' })
    expect((await attic.read()).items[0]).toMatchObject({ id: body.id, keptDespite: 'Comes down in May.' })
  })
})

describe('photos of something stored', () => {
  it('go along with it and are shown with it', async () => {
    const attic = await surveyed()
    const { body: photo } = await home.owner.post<PhotoRef>(`/api/units/${home.unitId}/photos`, photoForm(await drawnPhoto(40), { view: 'item' }))
    const { body } = await attic.put({ photoIds: [photo.id] })
    expect((await attic.read()).itemPhotos).toEqual([{ id: photo.id, itemId: body.id }])
    expect((await home.tenant.send(`/photos/${photo.id}/thumb`)).status).toBe(200)
    expect((await attic.put({ photoIds: [photo.id] })).body.data.fields).toHaveProperty('photoIds')
  })
})

describe('the guess coach', () => {
  it('knows this person\'s weighings against what they had noted', async () => {
    const attic = await surveyed()
    const weigh = async (lb: number) => {
      const { body } = await attic.put({ quantity: 1, lowLb: 10, typicalLb: 20, highLb: 40 })
      const { placedOn: _placedOn, ...facts } = item(home.today, { quantity: 1, lowLb: lb, typicalLb: lb, highLb: lb, weightSource: 'weighed' })
      await home.owner.patch(`/api/items/${body.id}`, { ...facts, happenedOn: home.today, version: body.version })
    }
    for (const lb of [30, 26, 40]) await weigh(lb)
    expect((await attic.read()).guesses).toEqual({ count: 3, medianRatio: 1.5 })
  })
})

describe('the terms of storage', () => {
  it('are signed by a tenant by name and server time, stay as they were signed, and are open to staff', async () => {
    const attic = await surveyed()
    const terms = (client = home.tenant) => client.get<TermsPage>(`${attic.path}/terms`)
    const { body: before } = await terms()
    expect(before.terms.rules.length).toBeGreaterThan(5)
    expect(before.terms.cautions.join()).toContain('licensed structural engineer')
    const sign = (rules = before.terms.rules, signedName = 'Tessa Invented') => home.tenant.post<Refusal & { signedAt: string }>(`${attic.path}/terms-signature`, { signedName, rules })
    expect((await sign(['Anything goes.'])).body.data.code).toBe('changed-meanwhile')
    expect((await sign(before.terms.rules, ' ')).body.data.fields).toHaveProperty('signedName')
    expect((await sign()).status).toBe(200)
    expect((await sign()).body.data.code).toBe('signed-already')
    expect((await terms(home.owner)).body.signatures).toMatchObject([{ signedName: 'Tessa Invented', isCurrent: true, isMine: false }])
    expect(await attic.rows.actions()).toContain('terms of storage signed')
    await attic.survey({ surveyedOn: home.today, conditions: ['wet'] })
    const { body: after } = await terms()
    expect(after.signatures).toMatchObject([{ isCurrent: false, isMine: true, terms: before.terms }])
    expect(after.terms.cautions.join()).toContain('The rating is on hold')
    await expect(home.db.updateTable('termsSignature').set({ signedName: 'Somebody else' }).execute()).rejects.toThrow(/append-only/)
  })

  it('are for those of the home', async () => {
    const attic = await surveyed()
    expect(await refusals(client => client.get(`${attic.path}/terms`), home.trades)).toEqual([401, 404, 404, 404])
    expect(await refusals(client => client.post(`${attic.path}/terms-signature`, { signedName: 'X', rules: ['x'] }), home.owner)).toEqual([401, 404, 404, 403])
  })
})

describe('"all still here"', () => {
  it('can be said by who lives there', async () => {
    const attic = await surveyed()
    await attic.put()
    const confirm = (client: Client) => client.post(`${attic.path}/inventory-confirmation`, { confirmedOn: home.today })
    expect((await confirm(home.tenant)).status).toBe(200)
    expect((await attic.read()).attic.inventoryConfirmedOn).toBe(home.today)
    expect(await refusals(confirm, home.engineer)).toEqual([401, 404, 404, 403])
  })
})
