import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { PhotoRef } from '../../../shared/types/photo'
import type { ReadingAnswer } from '../../../shared/types/markPage'
import type { MarkKind } from '../../../shared/types/mark'
import type { Receipt } from '../../../shared/types/receipt'
import { addDays } from '../../../shared/utils/days'
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

interface Refusal { message: string, data: { code: string, fields?: Record<string, string>, usual?: number } }
type Answered = ReadingAnswer & Refusal

async function openMark(kind: MarkKind = 'crack', more: object = {}): Promise<string> {
  const { body } = await home.tenant.post<Receipt>(`/api/units/${home.unitId}/observations`, { kind, roomId: home.bedroomId, ...more }, { headers: { 'idempotency-key': randomUUID() } })
  return body.mark.id
}
const read = (markId: string, body: object, { as = home.tenant, key = randomUUID() }: { as?: CeilingHome['owner'], key?: string } = {}) =>
  as.post<Answered>(`/api/marks/${markId}/readings`, { takenOn: home.today, ...body }, { headers: { 'idempotency-key': key } })
const rowOf = (id: string) => home.db.selectFrom('reading').selectAll().where('id', '=', id).executeTakeFirstOrThrow()

describe('recording a reading', () => {
  it('stores value, method and standard uncertainty, and plans the next one', async () => {
    const markId = await openMark()
    const { status, body } = await read(markId, { method: 'gauge-card', value: 1.2, lengthMm: 420, tip: 'past', note: 'By the lamp' })
    expect(status).toBe(200)
    expect(body).toMatchObject({ markId, takenOn: home.today, value: 1.2, activity: 'too-few-readings', nextReadingOn: addDays(home.today, 7), report: null, sudden: null })
    expect(await rowOf(body.id)).toMatchObject({ sigma: 0.2, quantity: 'width_mm', method: 'gauge-card', lengthMm: 420, segment: 1, takenBy: home.tenantId, note: 'By the lamp', detail: { tip: 'past' } })
    expect(await home.db.selectFrom('mark').select(['lastValue', 'lastReadOn', 'widthClass']).where('id', '=', markId).executeTakeFirst()).toEqual({ lastValue: 1.2, lastReadOn: home.today, widthClass: 2 })
    expect(await home.db.selectFrom('recordEntry').select('action').where('subjectId', '=', body.id).execute()).toEqual([{ action: 'reading recorded' }])
  })

  it.each<[MarkKind, object, object]>([
    ['crack', { method: 'coin-or-card', atLeast: 0.76, atMost: 1.35 }, { value: expect.closeTo(1.055, 9), low: 0.76, high: 1.35, sigma: 0.5 }],
    ['crack', { method: 'coin-or-card', atLeast: 2.15 }, { value: 2.15, low: 2.15, high: null, sigma: 1 }],
    ['crack', { method: 'coin-or-card', atMost: 0.76 }, { value: 0.38, low: 0, high: 0.76 }],
    ['crack', { method: 'calipers', value: 0 }, { value: 0, sigma: 0.1 }],
    ['crack', { method: 'guess', value: 3 }, { sigma: 1 }],
    ['crack', { method: 'ruler', value: 3 }, { sigma: 0.4 }],
    ['crack', { method: 'tell-tale', value: 3 }, { sigma: 0.2 }],
    ['crack', { method: 'photo-with-scale', value: 3 }, { sigma: 0.3 }],
    ['nail-pops', { method: 'count', value: 5 }, { value: 5, quantity: 'pop_count' }],
    ['sag', { method: 'string-line', value: 8, spanMm: 2400 }, { value: 8, quantity: 'drop_mm', detail: { spanMm: 2400, tip: null } }],
    ['stain', { method: 'ruler', value: 250, stain: 'damp' }, { value: 250, quantity: 'size_mm', stainState: 'damp' }],
    ['crack', { method: 'could-not-measure', reason: 'Too high for me' }, { value: null, sigma: null, couldNotMeasureReason: 'Too high for me' }],
  ])('takes a %s read as %o', async (kind, given, kept) => {
    const { status, body } = await read(await openMark(kind), given)
    expect(status).toBe(200)
    expect(await rowOf(body.id)).toMatchObject(kept)
  })

  it.each<[string, MarkKind, object, string]>([
    ['a way that does not suit', 'nail-pops', { method: 'ruler', value: 3 }, 'method'],
    ['no size', 'crack', { method: 'ruler' }, 'value'],
    ['a size below zero', 'crack', { method: 'ruler', value: -0.1 }, 'value'],
    ['a size beyond belief', 'crack', { method: 'ruler', value: 301 }, 'value'],
    ['words for a number', 'crack', { method: 'ruler', value: '1.2' }, 'value'],
    ['half a bump', 'nail-pops', { method: 'count', value: 2.5 }, 'value'],
    ['a range turned round', 'crack', { method: 'coin-or-card', atLeast: 2, atMost: 1 }, 'atMost'],
    ['a range by ruler', 'crack', { method: 'ruler', atLeast: 1, atMost: 2 }, 'atLeast'],
    ['a day to come', 'crack', { method: 'ruler', value: 1, takenOn: '2199-01-01' }, 'takenOn'],
    ['no day of the calendar', 'crack', { method: 'ruler', value: 1, takenOn: '2027-02-29' }, 'takenOn'],
    ['could not measure without a reason', 'crack', { method: 'could-not-measure' }, 'reason'],
    ['could not measure with a size', 'crack', { method: 'could-not-measure', reason: 'dark', value: 2 }, 'value'],
    ['no method', 'crack', { value: 2 }, 'method'],
    ['an unknown danger sign', 'crack', { method: 'ruler', value: 2, dangerSigns: ['ghosts'] }, 'dangerSigns.0'],
  ])('refuses %s at its field', async (_what, kind, given, field) => {
    const { status, body } = await read(await openMark(kind), given)
    expect(status).toBe(422)
    expect(Object.keys(body.data.fields!)).toEqual([field])
    expect(body.data.fields![field]!.length).toBeGreaterThan(8)
  })

  it('asks once about 12 mm where it was 1.2, and believes the person who confirms', async () => {
    const markId = await openMark('crack', { widthMm: 1.2, widthMethod: 'ruler' })
    const asked = await read(markId, { method: 'ruler', value: 12 })
    expect(asked).toMatchObject({ status: 422, body: { data: { code: 'ask-again', usual: 1.2, fields: { value: expect.stringContaining('12') } } } })
    expect(await home.db.selectFrom('reading').select('id').where('markId', '=', markId).execute()).toHaveLength(1)
    const sure = await read(markId, { method: 'ruler', value: 12, confirmed: true, takenOn: home.today })
    expect(sure.status).toBe(200)
  })

  it('tells at once that a mark jumped, and opens the urgent finding', async () => {
    const markId = await openMark()
    await read(markId, { method: 'gauge-card', value: 1, takenOn: addDays(home.today, -10) })
    const { body } = await read(markId, { method: 'gauge-card', value: 3.5 })
    expect(body.sudden).toEqual({ value: 3.5, baseline: 1 })
    expect(await home.db.selectFrom('finding').select(['severity']).where('subjectId', '=', markId).where('rule', '=', 'mark-sudden').execute()).toEqual([{ severity: 'urgent' }])
  })

  it('makes a report with its own number of danger seen while reading, even when nothing could be measured', async () => {
    const markId = await openMark()
    const { body } = await read(markId, { method: 'could-not-measure', reason: 'Left the room', dangerSigns: ['bits-falling'], stain: 'dripping' })
    expect(body.report?.dangerSigns).toEqual(['bits-falling', 'water-dripping'])
    expect((await home.tenant.get<Receipt>(`/api/observations/${body.report!.id}`)).body).toMatchObject({ number: body.report!.number, responseClass: 'danger', joinedKnownMark: true })
    expect(await home.db.selectFrom('finding').select('severity').where('subjectId', '=', markId).where('rule', '=', 'danger-sign').execute()).toEqual([{ severity: 'urgent' }])
    expect(await home.db.selectFrom('mark').select('stainState').where('id', '=', markId).executeTakeFirst()).toEqual({ stainState: 'dripping' })
  })

  it('ties photos to the reading and its mark', async () => {
    const markId = await openMark()
    const photoId = (await home.tenant.post<PhotoRef>(`/api/units/${home.unitId}/photos`, photoForm(await drawnPhoto(90)))).body.id
    const { body } = await read(markId, { method: 'ruler', value: 1, photoIds: [photoId] })
    expect(await home.db.selectFrom('photo').select(['markId', 'readingId']).where('id', '=', photoId).executeTakeFirst()).toEqual({ markId, readingId: body.id })
    expect((await read(markId, { method: 'ruler', value: 1, photoIds: [photoId] })).body.data.fields).toHaveProperty('photoIds')
  })

  it('answers the first reading again when it is sent twice, even at once', async () => {
    const markId = await openMark()
    const key = randomUUID()
    const answers = await Promise.all([1, 2, 3].map(value => read(markId, { method: 'ruler', value }, { key })))
    expect(new Set(answers.map(({ body }) => body.id)).size).toBe(1)
    expect(await home.db.selectFrom('reading').select('id').where('markId', '=', markId).execute()).toHaveLength(1)
    expect((await read(await openMark(), { method: 'ruler', value: 1 }, { key })).status).toBe(409)
    expect(await home.tenant.post(`/api/marks/${markId}/readings`, { takenOn: home.today, method: 'ruler', value: 1 })).toMatchObject({ status: 422, body: { data: { code: 'idempotency-key-needed' } } })
  })

  it('opens a repaired mark again when something is measured there, and refuses one that is closed', async () => {
    const markId = await openMark()
    const change = (to: string, version: number) => home.owner.patch(`/api/marks/${markId}`, { version, change: { to, happenedOn: home.today, reason: 'Filled' } })
    await change('repaired', 1)
    expect((await read(markId, { method: 'ruler', value: 0 })).status).toBe(200)
    expect(await home.db.selectFrom('mark').select(['state', 'segment']).where('id', '=', markId).executeTakeFirst()).toEqual({ state: 'repaired', segment: 2 })
    await read(markId, { method: 'ruler', value: 0.5 })
    expect(await home.db.selectFrom('mark').select('state').where('id', '=', markId).executeTakeFirst()).toEqual({ state: 'open' })
    expect((await change('closed', 3)).status).toBe(200)
    expect(await read(markId, { method: 'ruler', value: 1 })).toMatchObject({ status: 409, body: { data: { code: 'mark-closed' } } })
  })

  it('satisfies the reading plan when it could not be measured, without a value', async () => {
    const markId = await openMark('crack', { widthMm: 1.2, widthMethod: 'ruler' })
    await home.db.updateTable('reading').set({ takenOn: addDays(home.today, -30) }).where('markId', '=', markId).execute()
    const { body } = await read(markId, { method: 'could-not-measure', reason: 'No ladder' })
    expect(body).toMatchObject({ value: null, nextReadingOn: addDays(home.today, 14) })
    expect(await home.db.selectFrom('mark').select(['lastValue', 'lastReadOn']).where('id', '=', markId).executeTakeFirst()).toEqual({ lastValue: 1.2, lastReadOn: home.today })
  })

  it('keeps both numbers where one was asked about, and both of a double reading', async () => {
    const markId = await openMark('crack', { widthMm: 1.2, widthMethod: 'ruler' })
    const mended = await read(markId, { method: 'ruler', value: 1.3, wroteFirst: 12 })
    expect(await rowOf(mended.body.id)).toMatchObject({ value: 1.3, detail: { wroteFirst: 12 } })
    const stoodBy = await read(markId, { method: 'ruler', value: 12, confirmed: true })
    expect(await rowOf(stoodBy.body.id)).toMatchObject({ value: 12, detail: { askedAgainstUsual: 1.25 } })
    const apart = await read(markId, { method: 'gauge-card', value: 1.2, second: 3 })
    expect(apart.body.data).toMatchObject({ code: 'ask-again', fields: { second: expect.stringContaining('far apart') } })
    const twice = await read(markId, { method: 'gauge-card', value: 1.2, second: 1.4 })
    expect(await rowOf(twice.body.id)).toMatchObject({ firstValue: 1.2, secondValue: 1.4, value: expect.closeTo(1.3, 9), sigma: 0.2 })
  })

  it('judges a reader by five of their own double readings', async () => {
    const markId = await openMark()
    for (const second of [1.9, 0.3, 1.9, 0.3, 1.9]) expect((await read(markId, { method: 'ruler', value: 1.1, second })).status).toBe(200)
    const { body } = await read(markId, { method: 'ruler', value: 1.1 })
    // Differences of ∓0.8: standard deviation √(0.64·4.8/4) over √2.
    expect((await rowOf(body.id)).sigma).toBeCloseTo(Math.sqrt(0.64 * 4.8 / 4 / 2), 9)
    expect((await rowOf((await read(markId, { method: 'ruler', value: 1.1 }, { as: home.owner })).body.id)).sigma).toBe(0.4)
  })

  it('works the width out from points in the photo that came along, and refuses points in any other', async () => {
    const markId = await openMark()
    const photoId = (await home.tenant.post<PhotoRef>(`/api/units/${home.unitId}/photos`, photoForm(await drawnPhoto(70)))).body.id
    const at = (xPx: number, yPx: number) => ({ xPx, yPx })
    const photo = { photoId, widthPx: 640, heightPx: 480, a: at(0, 0), b: at(428, 0), distanceMm: 85.6, stations: [100, 200, 300].map(x => ({ p: at(x, 100), q: at(x, 107.5) })) }
    const loose = await read(markId, { method: 'photo-with-scale', photo })
    expect(loose.body.data.fields).toHaveProperty('photo')
    expect((await read(markId, { method: 'photo-with-scale', photo: { ...photo, stations: [] }, photoIds: [photoId] })).body.data.fields).toEqual({ photo: 'Measure across it at three places or more.' })
    const { body } = await read(markId, { method: 'photo-with-scale', photo, photoIds: [photoId] })
    expect(await rowOf(body.id)).toMatchObject({ value: expect.closeTo(1.5, 6), sigma: 0.18, detail: { photo: { photoId, distanceMm: 85.6 }, stationsMm: [1.5, 1.5, 1.5].map(mm => expect.closeTo(mm, 6)) } })
  })

  it('adds what is past the dated pencil marks to the last length', async () => {
    const markId = await openMark('crack', { lengthMm: 400, widthMm: 1, widthMethod: 'ruler' })
    const { body } = await read(markId, { method: 'ruler', value: 1, tip: 'past', tipPastMm: 25 })
    expect(await rowOf(body.id)).toMatchObject({ lengthMm: 425, detail: { tip: 'past', tipPastMm: 25 } })
  })

  it('takes readings out of order into the segment of their own day', async () => {
    const markId = await openMark()
    const on = (days: number, value: number) => read(markId, { method: 'ruler', value, takenOn: addDays(home.today, -days) }, { as: home.owner })
    const late = await on(5, 0.4)
    expect((await home.owner.patch(`/api/marks/${markId}`, { version: 1, change: { to: 'repaired', happenedOn: addDays(home.today, -10), reason: 'Filled' } })).status).toBe(200)
    const early = await on(40, 1.5)
    expect([(await rowOf(late.body.id)).segment, (await rowOf(early.body.id)).segment]).toEqual([2, 1])
    expect(await home.db.selectFrom('mark').select(['state', 'segment', 'lastValue']).where('id', '=', markId).executeTakeFirst()).toEqual({ state: 'repaired', segment: 2, lastValue: 0.4 })
  })

  it('keeps the server\'s clock and the phone\'s, and asks when the camera tells another day', async () => {
    const markId = await openMark()
    const { body } = await read(markId, { method: 'ruler', value: 1, phoneAt: '2019-05-01T10:00:00Z' })
    expect((await rowOf(body.id)).detail).toMatchObject({ phoneAt: '2019-05-01T10:00:00Z' })
    expect((await rowOf((await read(markId, { method: 'ruler', value: 1, phoneAt: new Date().toISOString() })).body.id)).detail).not.toHaveProperty('phoneAt')
    const photoId = (await home.tenant.post<PhotoRef>(`/api/units/${home.unitId}/photos`, photoForm(await drawnPhoto(71)))).body.id
    await home.db.updateTable('photo').set({ cameraTime: '2019-05-01 10:00:00' }).where('id', '=', photoId).execute()
    const asked = await read(markId, { method: 'ruler', value: 1, photoIds: [photoId] })
    expect(asked).toMatchObject({ status: 422, body: { data: { code: 'ask-day', cameraOn: '2019-05-01', fields: { takenOn: expect.stringContaining('2019') } } } })
    const sure = await read(markId, { method: 'ruler', value: 1, photoIds: [photoId], dayConfirmed: true })
    expect(await rowOf(sure.body.id)).toMatchObject({ takenOn: home.today, detail: { cameraOn: '2019-05-01' } })
  })

  it('is for those who live there or run it', async () => {
    const markId = await openMark()
    const status = async (as: CeilingHome['owner']) => (await read(markId, { method: 'ruler', value: 1 }, { as })).status
    expect([await status(home.nobody), await status(home.stranger), await status(home.neighbour), await status(home.engineer), await status(home.trades), await status(home.owner)])
      .toEqual([401, 404, 404, 403, 404, 200])
    expect((await read(randomUUID(), { method: 'ruler', value: 1 })).status).toBe(404)
  })
})
