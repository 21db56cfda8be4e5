import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { verifyChain } from '../../../server/db/commands/appendRecord'
import type { PhotoRef } from '../../../shared/types/photo'
import type { Receipt } from '../../../shared/types/receipt'
import { addDays } from '../../../shared/utils/days'
import { CARD_MM, COINS_MM } from '../../../shared/utils/movement/widthComparisons'
import { reportNumber } from '../../../shared/utils/report/reportNumber'
import { drawnPhoto, photoForm, plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
import { startServer, type TestServer } from '../../support/server'

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

interface Refusal { message: string, data: { code: string, fields?: Record<string, string> } }
type Sent = Receipt & Refusal

const crack = (more: object = {}) => ({ kind: 'crack', roomId: home.bedroomId, shape: 'wandering-line', place: 'middle', pin: { xShare: 0.3, yShare: 0.7 }, widthComparison: 'card', ...more })
const report = (body: object, { as = home.tenant, key = randomUUID(), unitId = home.unitId }: { as?: CeilingHome['owner'], key?: string, unitId?: string } = {}) =>
  as.post<Sent>(`/api/units/${unitId}/observations`, body, { headers: { 'idempotency-key': key } })
const sendPhoto = async (seed: number, as = home.tenant, view = 'close') => (await as.post<PhotoRef>(`/api/units/${home.unitId}/photos`, photoForm(await drawnPhoto(seed), { view }))).body.id

describe('reporting something on a ceiling', () => {
  it('opens a mark with its first reading and photos, and gives a receipt with number and server time', async () => {
    const photoIds = [await sendPhoto(1, home.tenant, 'wide'), await sendPhoto(2)]
    const before = new Date().toISOString()
    const { status, body } = await report(crack({ photoIds, firstSeenOn: addDays(home.today, -3), lengthMm: 400, note: '  Over the bed ' }))
    expect(status).toBe(200)
    expect(body).toMatchObject({
      reportedBy: 'Tessa Invented', unit: { name: 'Flat 1', propertyName: 'Invented Row' }, room: { name: 'Bedroom' }, joinedKnownMark: false,
      mark: { kind: 'crack', state: 'open', label: 'Crack, Bedroom', firstSeenOn: addDays(home.today, -3), nextReadingOn: addDays(home.today, 7) },
      dangerSigns: [], responseClass: 'routine', startedAt: null, correctedAt: null,
      reading: { value: (CARD_MM + COINS_MM.dime) / 2, low: CARD_MM, high: COINS_MM.dime, method: 'coin-or-card' },
    })
    expect(body.receivedAt >= before && body.receivedAt <= new Date().toISOString()).toBe(true)
    expect(body.correctBy).toBe(new Date(Date.parse(body.receivedAt) + 30 * 24 * 3_600_000).toISOString())
    expect(body.photos.map(photo => photo.id).sort()).toEqual([...photoIds].sort())

    const mark = await home.db.selectFrom('mark').selectAll().where('id', '=', body.mark.id).executeTakeFirstOrThrow()
    expect(mark).toMatchObject({ unitId: home.unitId, roomId: home.bedroomId, atticId: home.atticId, pinX: 0.3, pinY: 0.7, shape: 'wandering-line', activity: 'too-few-readings', lastReadOn: home.today, widthClass: 2, createdBy: home.tenantId })
    const reading = await home.db.selectFrom('reading').selectAll().where('markId', '=', mark.id).executeTakeFirstOrThrow()
    expect(reading).toMatchObject({ takenOn: home.today, quantity: 'width_mm', sigma: 0.5, lengthMm: 400, segment: 1 })
    const observation = await home.db.selectFrom('observation').selectAll().where('id', '=', body.id).executeTakeFirstOrThrow()
    expect(observation.answers).toMatchObject({ note: 'Over the bed', doors: 'not-known', stain: 'none' })
  })

  it('writes it all to the unit\'s record, whose chain holds', async () => {
    const { body } = await report(crack({ photoIds: [await sendPhoto(3)] }))
    const entries = await home.db.selectFrom('recordEntry').select(['action', 'actorName', 'after']).where('unitId', '=', home.unitId).where('subjectId', 'in', [body.id, body.mark.id]).orderBy('seq').execute()
    expect(entries.map(entry => [entry.action, entry.actorName])).toEqual([['mark opened', 'Tessa Invented'], ['observation reported', 'Tessa Invented']])
    expect(entries[1]!.after).toMatchObject({ number: body.number, photos: [{ sha256: expect.stringMatching(/^[0-9a-f]{64}$/) }] })
    expect(await verifyChain(home.db, home.unitId)).toMatchObject({ kind: 'unbroken' })
  })

  it('mails the owner', async () => {
    const { body } = await report(crack({ roomId: home.hallId }))
    const mail = await server.mail.waitForMessage(home.ownerEmail, { subject: /Hall/ })
    expect(mail.text.replace(/\s+/g, ' ')).toContain(`Report ${reportNumber(body.number)}, mark ${body.mark.number}`)
  })

  it('answers the first receipt again when the same report is sent twice, even at once', async () => {
    const key = randomUUID()
    const photoIds = [await sendPhoto(4)]
    const marksBefore = await home.db.selectFrom('mark').select('id').execute()
    const [one, two] = await Promise.all([report(crack({ photoIds }), { key }), report(crack({ photoIds }), { key })])
    const three = await report(crack({ widthComparison: 'wider' }), { key })
    expect([one.status, two.status, three.status]).toEqual([200, 200, 200])
    expect(new Set([one, two, three].map(({ body }) => `${body.id} ${body.number}`)).size).toBe(1)
    expect((await home.db.selectFrom('mark').select('id').execute()).length).toBe(marksBefore.length + 1)
    expect(await report({ kind: 'crack', roomId: home.otherRoomId }, { key, as: home.owner, unitId: home.otherUnitId })).toMatchObject({ status: 200 })
    expect(await home.tenant.post(`/api/units/${home.unitId}/observations`, crack())).toMatchObject({ status: 422, body: { data: { code: 'idempotency-key-needed' } } })
  })

  it('takes danger signs, ticked or plain from the answers, as urgent at once', async () => {
    const { body } = await report({ kind: 'sag', roomId: home.bedroomId, shape: 'long-dip', stain: 'dripping', dangerSigns: ['bits-falling', 'bits-falling'] })
    expect(body.dangerSigns).toEqual(['bits-falling', 'wet-and-bulging', 'water-dripping'])
    expect(body).toMatchObject({ responseClass: 'danger', reading: null, correctBy: new Date(Date.parse(body.receivedAt) + 24 * 3_600_000).toISOString() })
    const finding = await home.db.selectFrom('finding').selectAll().where('subjectId', '=', body.mark.id).where('rule', '=', 'danger-sign').executeTakeFirstOrThrow()
    expect(finding).toMatchObject({ severity: 'urgent', clearedAt: null })
    expect(await server.mail.waitForMessage(home.ownerEmail, { subject: /Act now/ })).toBeDefined()
  })

  it.each([
    ['hair', { widthComparison: 'hair' }, { value: 0.05, low: 0, high: 0.1, method: 'coin-or-card' }],
    ['wider than a finger', { widthComparison: 'wider' }, { value: 12, low: 12, high: null, method: 'guess' }],
    ['a ruler goes before a comparison', { widthComparison: 'card', widthMm: 2.5, widthMethod: 'ruler' }, { value: 2.5, low: null, high: null, method: 'ruler' }],
    ['bumps are counted', { kind: 'nail-pops', shape: 'bumps-in-a-row', widthComparison: null, popCount: 4 }, { value: 4, method: 'count' }],
    ['a sag below a string', { kind: 'sag', shape: 'shallow-dish', widthComparison: null, sagDropMm: 9, sagSpanMm: 2000, widthMethod: 'string-line' }, { value: 9, method: 'string-line' }],
    ['a stain', { kind: 'stain', shape: 'ring', widthComparison: null, stain: 'dry', stainSizeMm: 300 }, { value: 300, method: 'guess' }],
  ])('makes the first reading: %s', async (_what, more, reading) => {
    expect((await report(crack(more))).body.reading).toMatchObject(reading)
  })

  it('adds to a mark that is followed already, opens it again after a repair, and tells the owner', async () => {
    const first = (await report(crack())).body
    await home.owner.patch(`/api/marks/${first.mark.id}`, { version: 1, change: { to: 'repaired', happenedOn: home.today, reason: 'Filled and painted' } })
    const again = await report(crack({ sameAsMarkId: first.mark.id, widthComparison: 'one-coin' }))
    expect(again.body).toMatchObject({ joinedKnownMark: true, mark: { id: first.mark.id, state: 'open' } })
    const readings = await home.db.selectFrom('reading').select(['segment']).where('markId', '=', first.mark.id).orderBy('receivedAt').execute()
    expect(readings.map(reading => reading.segment)).toEqual([1, 2])
    const mail = await server.mail.waitForMessage(home.ownerEmail, { subject: /Reported again/ })
    expect(mail.text.replace(/\s+/g, ' ')).toContain(`Report ${reportNumber(again.body.number)}`)
  })

  it.each<[string, () => object | Promise<object>, string]>([
    ['no room', () => ({ kind: 'crack' }), 'roomId'],
    ['a room next door', () => crack({ roomId: home.otherRoomId }), 'roomId'],
    ['a kind we do not know', () => crack({ kind: 'ghost' }), 'kind'],
    ['a picture of another kind', () => crack({ shape: 'ring' }), 'shape'],
    ['a day to come', () => crack({ firstSeenOn: addDays(home.today, 1) }), 'firstSeenOn'],
    ['no day of the calendar', () => crack({ firstSeenOn: '2027-02-30' }), 'firstSeenOn'],
    ['a width below zero', () => crack({ widthMm: -1 }), 'widthMm'],
    ['seven photos', () => crack({ photoIds: Array.from({ length: 7 }, () => randomUUID()) }), 'photoIds'],
    ['a photo that is not there', () => crack({ photoIds: [randomUUID()] }), 'photoIds'],
    ['somebody else\'s photo', async () => crack({ photoIds: [await sendPhoto(50, home.owner)] }), 'photoIds'],
    ['a mark next door', () => crack({ sameAsMarkId: randomUUID() }), 'sameAsMarkId'],
    ['a pin outside the ceiling', () => crack({ pin: { xShare: 1.2, yShare: 0 } }), 'pin.xShare'],
    ['a note without end', () => crack({ note: 'x'.repeat(2001) }), 'note'],
    ['a field nobody asked for', () => crack({ admin: true }), 'form'],
  ])('refuses %s at its field', async (_what, make, field) => {
    const { status, body } = await report(await make())
    expect(status).toBe(422)
    expect(Object.keys(body.data.fields!)).toContain(field)
    expect(body.data.fields![field]).not.toMatch(/^Invalid input: expected/)
  })

  it('keeps nothing of a refused report', async () => {
    const photoId = await sendPhoto(60)
    const marks = await home.db.selectFrom('mark').select('id').execute()
    await report(crack({ photoIds: [photoId, randomUUID()] }))
    expect(await home.db.selectFrom('mark').select('id').execute()).toHaveLength(marks.length)
    expect((await report(crack({ photoIds: [photoId] }))).status).toBe(200)
    expect((await report(crack({ photoIds: [photoId] }))).body.data.fields).toHaveProperty('photoIds')
  })

  it('is for those who live there or run it', async () => {
    const status = async (as: CeilingHome['owner']) => (await report(crack(), { as })).status
    expect([await status(home.nobody), await status(home.stranger), await status(home.neighbour), await status(home.engineer), await status(home.owner)]).toEqual([401, 404, 404, 403, 200])
  })
})

describe('the receipt', () => {
  it('can be read again by those who may see the home', async () => {
    const { body } = await report(crack())
    const see = (as: CeilingHome['owner']) => as.get<Receipt & { abilities: string[] }>(`/api/observations/${body.id}`)
    expect((await see(home.tenant)).body).toMatchObject({ ...body, abilities: expect.arrayContaining(['report observation']) })
    expect((await see(home.tenant)).body.abilities).not.toContain('edit mark')
    expect([(await see(home.engineer)).status, (await see(home.nobody)).status, (await see(home.neighbour)).status, (await see(home.stranger)).status]).toEqual([200, 401, 404, 404])
  })

  it('keeps when work started and when it was put right as two instants, and correcting ends the danger', async () => {
    const { body } = await report(crack({ dangerSigns: ['fast-widening'] }))
    const step = (as: CeilingHome['owner'], change: object) => as.patch<Sent>(`/api/observations/${body.id}`, change)
    const open = () => home.db.selectFrom('finding').select('id').where('subjectId', '=', body.mark.id).where('rule', '=', 'danger-sign').where('clearedAt', 'is', null).execute()
    expect((await step(home.tenant, { step: 'started', note: 'x' })).status).toBe(403)
    expect((await step(home.stranger, { step: 'started', note: 'x' })).status).toBe(404)
    expect((await step(home.owner, { step: 'started', note: ' ' })).body.data.fields).toHaveProperty('note')
    expect((await step(home.owner, { step: 'started', note: 'Rang them' })).body).toMatchObject({ startedAt: expect.any(String), correctedAt: null })
    expect(await open()).toHaveLength(1)
    expect((await step(home.owner, { step: 'started', note: 'Again' })).status).toBe(409)
    expect((await step(home.owner, { step: 'corrected', note: 'An engineer looked' })).body.correctedAt).toEqual(expect.any(String))
    expect(await open()).toHaveLength(0)
    const entries = await home.db.selectFrom('recordEntry').select('action').where('subjectId', '=', body.id).orderBy('seq').execute()
    expect(entries.map(entry => entry.action)).toEqual(['observation reported', 'work on report started', 'report put right'])
  })
})
