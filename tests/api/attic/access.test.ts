import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Client } from '../../support/client'
import { plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
import { startServer, type TestServer } from '../../support/server'
import { about, item, newAttic, paperForm, survey } from './atticInputs'

let server: TestServer
let home: CeilingHome
let attic: Awaited<ReturnType<typeof newAttic>>
let itemId: string
let documentId: string

beforeAll(async () => {
  server = await startServer()
  home = await plantCeilingHome(server)
  attic = await newAttic(home)
  await attic.survey()
  itemId = (await attic.put()).body.id
  documentId = (await attic.paper(about(home.today))).body.id
})
afterAll(async () => {
  await home?.close()
  await server?.stop()
})

type Asking = (as: Client) => Promise<{ status: number }>
const today = () => home.today

const edits: [string, Asking][] = [
  ['PATCH /attics/:id', as => as.patch(attic.path, { name: 'Other', notes: '', version: 1 })],
  ['POST surveys', as => as.post(`${attic.path}/surveys`, survey(today()))],
  ['POST items', as => as.post(`${attic.path}/items`, item(today()))],
  ['POST moves', as => as.post(`${attic.path}/moves`, { happenedOn: today(), moves: [{ itemId, version: 1, fieldNumber: 1, xFt: 1, yFt: 4, lengthFt: 2, widthFt: 2 }] })],
  ['POST archive', as => as.post(`${attic.path}/archive`, { version: 1 })],
  ['POST restore', as => as.post(`${attic.path}/restore`, { version: 1 })],
  ['POST documents', as => as.post(`${attic.path}/documents`, paperForm(about(today())))],
  ['POST documents/withdrawal', as => as.post(`/api/documents/${documentId}/withdrawal`)],
  ['PATCH /items/:id', as => as.patch(`/api/items/${itemId}`, { ...item(today()), placedOn: undefined, happenedOn: today(), version: 1 })],
  ['POST items/removal', as => as.post(`/api/items/${itemId}/removal`, { removedOn: today(), version: 1 })],
]
const reads: [string, Asking][] = [
  ['GET /attics/:id', as => as.get(attic.path)],
  ['GET /documents/:id', as => as.get(`/api/documents/${documentId}`)],
]
const ofPortfolio: [string, Asking][] = [
  ['GET /overview', as => as.get('/api/overview')],
  ['POST /overview/looked', as => as.post('/api/overview/looked')],
]

describe('who may do what in an attic', () => {
  it.each(edits)('%s: signed out 401, strangers and neighbours 404, tenant and engineer of the home 403', async (_name, ask) => {
    const askers = [home.nobody, home.stranger, home.neighbour, home.trades, home.tenant, home.engineer]
    expect(await Promise.all(askers.map(async as => (await ask(as)).status))).toEqual([401, 404, 404, 404, 403, 403])
  })

  it.each(reads)('%s: signed out 401, strangers, neighbours and trades 404, people of the home 200', async (_name, ask) => {
    const askers = [home.nobody, home.stranger, home.neighbour, home.trades, home.tenant, home.engineer, home.owner]
    expect(await Promise.all(askers.map(async as => (await ask(as)).status))).toEqual([401, 404, 404, 404, 200, 200, 200])
  })

  it.each(ofPortfolio)('%s: for staff only', async (_name, ask) => {
    const askers = [home.nobody, home.tenant, home.engineer, home.trades, home.owner]
    expect(await Promise.all(askers.map(async as => (await ask(as)).status))).toEqual([401, 403, 403, 403, 200])
  })

  it('GET /attics lists those of one\'s own homes; trades have none to see', async () => {
    const askers = [home.nobody, home.trades, home.neighbour, home.tenant, home.engineer, home.owner]
    const answers = await Promise.all(askers.map(as => as.get<{ rows?: { unitId: string }[] }>('/api/attics')))
    expect(answers.map(({ status, body }) => [status, body.rows?.length])).toEqual([[401, undefined], [403, undefined], [200, 0], [200, 2], [200, 2], [200, 2]])
  })

  it.each(['/api/attics/', '/api/documents/'])('%s with an id that is nobody\'s, or no id at all, is 404', async (path) => {
    expect((await home.owner.get(path + randomUUID())).status).toBe(404)
    expect((await home.owner.get(`${path}no-id`)).status).toBe(404)
  })

  it('changed nothing for all those who were refused', async () => {
    const [row] = await Promise.all([home.db.selectFrom('attic').selectAll().where('id', '=', attic.id).executeTakeFirstOrThrow()])
    expect(row).toMatchObject({ name: 'Invented attic', version: 1, archivedAt: null, inventoryConfirmedOn: null })
    expect(await attic.rows.events()).toHaveLength(1)
    expect(await attic.rows.actions(itemId)).toEqual(['item put in the attic'])
  })

  it('tells a tenant what they may do: see, not edit', async () => {
    const { body } = await home.tenant.get<{ abilities: string[] }>(attic.path)
    expect(body.abilities).toContain('see attic')
    expect(body.abilities).not.toContain('edit attic')
  })
})
