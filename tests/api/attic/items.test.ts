import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { verifyChain } from '../../../server/db/commands/appendRecord'
import type { AtticItemValue } from '../../../shared/schemas/atticItem'
import { addDays } from '../../../shared/utils/days'
import { plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
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

type Answered = AtticItemValue & Refusal & { id: string, version: number, removedOn: string | null }
const change = (id: string, version: number, more: object = {}) => {
  const { placedOn: _placedOn, ...facts } = item(home.today)
  return home.owner.patch<Answered>(`/api/items/${id}`, { ...facts, happenedOn: home.today, version, ...more })
}
const takeOut = (id: string, version: number, removedOn = home.today) => home.owner.post<Answered>(`/api/items/${id}/removal`, { removedOn, version })
async function surveyed() {
  const attic = await newAttic(home)
  await attic.survey({ surveyedOn: addDays(home.today, -100) })
  return attic
}
const stored = (id: string) => home.db.selectFrom('atticItem').selectAll().where('id', '=', id).executeTakeFirstOrThrow()

describe('putting something in the attic', () => {
  it('keeps the item, a step of the load history, the record and the new verdict', async () => {
    const attic = await surveyed()
    const { status, body } = await attic.put({ name: '  Winter clothes ', placedOn: addDays(home.today, -20) })
    expect(status).toBe(200)
    expect(await stored(body.id)).toMatchObject({ name: 'Winter clothes', quantity: 2, typicalLb: 30, unitId: home.unitId, removedOn: null, version: 1 })
    expect(await attic.rows.events()).toMatchObject([{ kind: 'in', deltaLb: 60, totalAfterLb: 60, happenedOn: addDays(home.today, -20), itemId: body.id }])
    expect(await attic.rows.actions(body.id)).toEqual(['item put in the attic'])
    expect(await attic.rows.status()).toMatchObject({ loadState: 'within', storedLb: 60 })
    expect(await verifyChain(home.db, home.unitId)).toMatchObject({ kind: 'unbroken' })
  })

  it('makes a finding and a mail at once when a joist is over', async () => {
    const attic = await surveyed()
    await attic.put({ quantity: 1, lowLb: 2000, typicalLb: 2000, highLb: 2000, weightSource: 'weighed', xFt: 5 })
    expect(await attic.rows.findings()).toEqual(['heavy-item-in-middle', 'joist-over'])
    expect(await attic.rows.status()).toMatchObject({ loadState: 'over' })
    expect(await server.mail.waitForMessage(home.ownerEmail, { subject: /./ })).toBeDefined()
  })

  it('counts a step entered late from its own day', async () => {
    const attic = await surveyed()
    await attic.put({ placedOn: addDays(home.today, -5) })
    await attic.put({ placedOn: addDays(home.today, -50), quantity: 1 })
    const { events } = await attic.read()
    expect(events.map(event => [event.happenedOn, event.totalAfterLb])).toEqual([[addDays(home.today, -5), 90], [addDays(home.today, -50), 30]])
  })

  it.each<[string, object, string]>([
    ['beyond the span', { xFt: 10.5 }, 'xFt'],
    ['beyond the last joist', { yFt: 15 }, 'yFt'],
    ['before the wall', { xFt: -1 }, 'xFt'],
    ['over joists that were not surveyed', { fieldNumber: 2 }, 'fieldNumber'],
    ['without a name', { name: ' ' }, 'name'],
    ['no weight', { lowLb: 0, typicalLb: 0, highLb: 0 }, 'typicalLb'],
    ['weights out of order', { lowLb: 40 }, 'typicalLb'],
    ['weighed, yet a range', { weightSource: 'weighed' }, 'typicalLb'],
    ['half a piece', { quantity: 1.5 }, 'quantity'],
    ['no length', { lengthFt: 0 }, 'lengthFt'],
    ['a key that is not in the catalogue', { catalogueKey: 'moon-rock' }, 'catalogueKey'],
    ['a day of the year 30000', { placedOn: '30000-01-01' }, 'placedOn'],
    ['a field nobody asked for', { atticId: 'x' }, 'form'],
  ])('refuses what stands %s, at its field', async (_what, more, field) => {
    const attic = await surveyed()
    const { status, body } = await attic.put(more)
    expect(status).toBe(422)
    expect(Object.keys(body.data.fields!)).toContain(field)
    expect(await attic.rows.events()).toEqual([])
  })

  it('refuses a day to come', async () => {
    const attic = await surveyed()
    expect((await attic.put({ placedOn: addDays(home.today, 2) })).body.data.fields).toEqual({ placedOn: 'That day has not come yet.' })
  })
})

describe('changing an item', () => {
  it('notes a weighing as a step of the load, with the guess beside it', async () => {
    const attic = await surveyed()
    const { body: first } = await attic.put()
    const { status, body } = await change(first.id, 1, { lowLb: 52, typicalLb: 52, highLb: 52, weightSource: 'weighed' })
    expect(status).toBe(200)
    expect(body).toMatchObject({ version: 2, typicalLb: 52 })
    expect((await attic.rows.events()).at(-1)).toMatchObject({ kind: 'reweighed', deltaLb: 44, totalAfterLb: 104, detail: { fromLb: 60, toLb: 104, weightSource: 'weighed' } })
    expect(await attic.rows.actions(first.id)).toEqual(['item put in the attic', 'item changed'])
  })

  it('notes a new place as a move that weighs nothing, and a new name as no step at all', async () => {
    const attic = await surveyed()
    const { body: first } = await attic.put()
    await change(first.id, 1, { name: 'Renamed' })
    expect(await attic.rows.events()).toHaveLength(1)
    await change(first.id, 2, { name: 'Renamed', xFt: 10 })
    expect((await attic.rows.events()).at(-1)).toMatchObject({ kind: 'moved', deltaLb: 0, detail: { from: { xFt: 0 }, to: { xFt: 10 } } })
  })

  it('answers a stale version with theirs, and changes nothing', async () => {
    const attic = await surveyed()
    const { body: first } = await attic.put()
    await change(first.id, 1, { name: 'Theirs' })
    const { status, body } = await change(first.id, 1, { name: 'Mine' })
    expect(status).toBe(409)
    expect(body.data).toMatchObject({ code: 'changed-meanwhile', theirs: { name: 'Theirs', version: 2 } })
    expect(await stored(first.id)).toMatchObject({ name: 'Theirs' })
  })

  it.each<[string, (today: string) => object, string]>([
    ['outside the field', () => ({ xFt: 11 }), 'xFt'],
    ['on a day to come', today => ({ happenedOn: addDays(today, 2) }), 'happenedOn'],
    ['to another place before it came', today => ({ xFt: 3, happenedOn: addDays(today, -1) }), 'happenedOn'],
    ['without a version', () => ({ version: undefined }), 'version'],
  ])('refuses a change %s', async (_what, more, field) => {
    const attic = await surveyed()
    const { body: first } = await attic.put()
    const { status, body } = await change(first.id, 1, more(home.today))
    expect(status).toBe(422)
    expect(Object.keys(body.data.fields!)).toContain(field)
    expect(await stored(first.id)).toMatchObject({ version: 1 })
  })
})

describe('moves from the load plan', () => {
  const spot = (itemId: string, version: number, more: object = {}) => ({ itemId, version, fieldNumber: 1, xFt: 10, yFt: 8, lengthFt: 2, widthFt: 2, ...more })
  const move = (path: string, ...moves: object[]) => home.owner.post<Refusal & { moved: number }>(`${path}/moves`, { happenedOn: home.today, moves })

  it('are saved together, each a step of the history', async () => {
    const attic = await surveyed()
    const [one, two] = [(await attic.put()).body, (await attic.put({ yFt: 8 })).body]
    expect((await move(attic.path, spot(one.id, 1), spot(two.id, 1, { yFt: 12 }))).body).toEqual({ moved: 2 })
    expect((await attic.rows.events()).map(event => event.kind)).toEqual(['in', 'in', 'moved', 'moved'])
    expect([await stored(one.id), await stored(two.id)]).toMatchObject([{ xFt: 10, yFt: 8, version: 2 }, { yFt: 12, version: 2 }])
  })

  it.each<[string, number, (id: string) => object]>([
    ['one of them is stale', 409, id => spot(id, 7)],
    ['one of them leaves the field', 422, id => spot(id, 1, { xFt: 11 })],
    ['one of them is not here', 404, () => spot(randomUUID(), 1)],
  ])('are none at all when %s', async (_what, status, second) => {
    const attic = await surveyed()
    const [one, two] = [(await attic.put()).body, (await attic.put({ yFt: 8 })).body]
    expect((await move(attic.path, spot(one.id, 1), second(two.id))).status).toBe(status)
    expect(await stored(one.id)).toMatchObject({ xFt: 0, version: 1 })
    expect(await attic.rows.events()).toHaveLength(2)
  })

  it('that leave their field are refused by which of them and where', async () => {
    const attic = await surveyed()
    const [one, two] = [(await attic.put()).body, (await attic.put({ yFt: 8 })).body]
    const { body } = await move(attic.path, spot(one.id, 1), spot(two.id, 1, { xFt: 11, yFt: 15 }))
    expect(Object.keys(body.data.fields!)).toEqual(['moves.1.xFt', 'moves.1.yFt'])
    expect(Object.keys((await move(attic.path, spot(one.id, 1, { fieldNumber: 9 }))).body.data.fields!)).toEqual(['moves.0.fieldNumber'])
    expect((await move(attic.path, spot(one.id, 1, { xFt: -1 }))).body.data.fields).toHaveProperty('moves.0.xFt')
  })

  it('are refused when there is none, twice the same, or from another attic', async () => {
    const [attic, other] = [await surveyed(), await surveyed()]
    const [one, elsewhere] = [(await attic.put()).body, (await other.put()).body]
    expect((await move(attic.path)).body.data.fields).toHaveProperty('moves')
    expect((await move(attic.path, spot(one.id, 1), spot(one.id, 1))).body.data.fields).toHaveProperty('moves')
    expect((await move(attic.path, spot(elsewhere.id, 1))).status).toBe(404)
  })
})

describe('taking something out', () => {
  it('keeps it in the history, and the load goes down on that day', async () => {
    const attic = await surveyed()
    const { body } = await attic.put({ placedOn: addDays(home.today, -9) })
    expect((await takeOut(body.id, 1, addDays(home.today, -2))).body).toMatchObject({ removedOn: addDays(home.today, -2), version: 2 })
    expect((await attic.rows.events()).at(-1)).toMatchObject({ kind: 'out', deltaLb: -60, totalAfterLb: 0, happenedOn: addDays(home.today, -2) })
    expect((await attic.read()).items).toEqual([])
    expect(await attic.rows.actions(body.id)).toEqual(['item put in the attic', 'item taken out of the attic'])
  })

  it('is refused before it came in, before its last change, and in the future', async () => {
    const attic = await surveyed()
    const { body } = await attic.put({ placedOn: addDays(home.today, -9) })
    expect((await takeOut(body.id, 1, addDays(home.today, -10))).body.data.fields).toHaveProperty('removedOn')
    await change(body.id, 1, { typicalLb: 31, happenedOn: addDays(home.today, -3) })
    expect((await takeOut(body.id, 2, addDays(home.today, -4))).body.data.fields).toHaveProperty('removedOn')
    expect((await takeOut(body.id, 2, addDays(home.today, 2))).body.data.fields).toEqual({ removedOn: 'That day has not come yet.' })
  })

  it('happens once; what is out can neither leave again nor be changed', async () => {
    const attic = await surveyed()
    const { body } = await attic.put()
    const [one, two] = await Promise.all([takeOut(body.id, 1), takeOut(body.id, 1)])
    expect([one.status, two.status].sort()).toEqual([200, 409])
    expect(await takeOut(body.id, 2)).toMatchObject({ status: 409, body: { data: { code: 'taken-out' } } })
    expect(await change(body.id, 2)).toMatchObject({ status: 409, body: { data: { code: 'taken-out' } } })
    expect(await attic.rows.events()).toHaveLength(2)
  })

  it('of a stale version shows theirs', async () => {
    const attic = await surveyed()
    const { body } = await attic.put()
    await change(body.id, 1, { name: 'Theirs' })
    expect(await takeOut(body.id, 1)).toMatchObject({ status: 409, body: { data: { theirs: { name: 'Theirs' } } } })
  })
})

describe('people at the same attic at once', () => {
  it('each get their item in, and the totals add up', async () => {
    const attic = await surveyed()
    const answers = await Promise.all(Array.from({ length: 6 }, (_, i) => attic.put({ yFt: 2 * i })))
    expect(answers.map(answer => answer.status)).toEqual(Array.from({ length: 6 }, () => 200))
    expect((await attic.rows.events()).map(event => event.totalAfterLb).sort((a, b) => a - b)).toEqual([60, 120, 180, 240, 300, 360])
    expect(await attic.rows.status()).toMatchObject({ storedLb: 360 })
  })
})

describe('confirming the inventory', () => {
  it('keeps the day on the attic and in the record', async () => {
    const attic = await surveyed()
    await attic.put()
    expect((await home.owner.post(`${attic.path}/inventory-confirmation`, { confirmedOn: home.today })).status).toBe(200)
    expect((await attic.read()).attic).toMatchObject({ inventoryConfirmedOn: home.today, version: 2 })
    expect((await attic.rows.actions()).at(-1)).toBe('inventory confirmed')
  })

  it.each([['no day', undefined], ['a day to come', '2199-01-01'], ['no date', 'yesterday']])('refuses %s', async (_what, confirmedOn) => {
    const attic = await newAttic(home)
    expect((await home.owner.post<Refusal>(`${attic.path}/inventory-confirmation`, { confirmedOn })).body.data.fields).toHaveProperty('confirmedOn')
  })
})
