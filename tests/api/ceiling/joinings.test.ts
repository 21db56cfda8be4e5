import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { verifyChain } from '../../../server/db/commands/appendRecord'
import { newId } from '../../../server/utils/newId'
import type { MarkFacts, MarkPage, UnitCeilings } from '../../../shared/types/markPage'
import type { PhotoRef } from '../../../shared/types/photo'
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

interface Refusal { message: string, data: { code: string, fields?: Record<string, string> } }

async function openMark(body: object = {}, photoIds: string[] = []): Promise<string> {
  const { body: receipt } = await home.tenant.post<Receipt>(`/api/units/${home.unitId}/observations`, { kind: 'crack', roomId: home.bedroomId, photoIds, ...body }, { headers: { 'idempotency-key': randomUUID() } })
  return receipt.mark.id
}
const read = (markId: string, daysAgo: number, value: number) =>
  home.owner.post<{ id: string } & Refusal>(`/api/marks/${markId}/readings`, { takenOn: addDays(home.today, -daysAgo), method: 'gauge-card', value }, { headers: { 'idempotency-key': randomUUID() } })
const pageOf = async (markId: string) => (await home.owner.get<MarkPage>(`/api/marks/${markId}`)).body
const version = async (markId: string) => (await pageOf(markId)).mark.version
const join = async (markId: string, intoId: string, more: object = {}, as = home.owner) =>
  as.post<MarkFacts & Refusal>(`/api/marks/${markId}/joining`, { intoId, reason: 'Reported twice', version: await version(markId), ...more })
const undo = (markId: string, as = home.owner) => as.remove<MarkFacts & Refusal>(`/api/marks/${markId}/joining`)
const split = async (markId: string, more: object) =>
  home.owner.post<MarkFacts & Refusal>(`/api/marks/${markId}/splits`, { label: 'The other crack', roomId: home.hallId, pin: { xShare: 0.8, yShare: 0.2 }, reason: 'Two cracks, not one', version: await version(markId), ...more })
const repair = async (markId: string, daysAgo: number) =>
  home.owner.patch(`/api/marks/${markId}`, { version: await version(markId), change: { to: 'repaired', happenedOn: addDays(home.today, -daysAgo), reason: 'Filled' } })

describe('joining two marks', () => {
  it('brings readings, reports, photos and jobs over, says where from, and leaves a page that says where they went', async () => {
    const photoId = (await home.tenant.post<PhotoRef>(`/api/units/${home.unitId}/photos`, photoForm(await drawnPhoto(11)))).body.id
    const [twin, kept] = [await openMark({ widthMm: 1, widthMethod: 'ruler' }, [photoId]), await openMark()]
    await read(twin, 30, 0.8)
    await read(kept, 20, 0.9)
    const jobId = newId()
    await home.db.insertInto('job').values({ id: jobId, organisationId: home.organisationId, unitId: home.unitId, number: 900, title: 'Fill it', markId: twin, dueOn: home.today, priority: 'routine', createdBy: home.tenantId, createdAt: new Date().toISOString() }).execute()
    const { status, body } = await join(twin, kept)
    expect(status).toBe(200)
    expect(body).toMatchObject({ id: twin, state: 'closed', joinedInto: kept, nextReadingOn: null })
    const [into, from] = [await pageOf(kept), await pageOf(twin)]
    expect(into.readings.map(({ value, fromMark }) => [value, fromMark])).toEqual([[0.8, from.mark.number], [0.9, null], [1, from.mark.number]])
    expect([into.reports.length, into.photos.map(photo => photo.id), into.jobs.map(job => job.id)]).toEqual([2, [photoId], [jobId]])
    expect(into.joinedFrom).toMatchObject([{ markId: twin, reason: 'Reported twice' }])
    expect(from).toMatchObject({ readings: [], joinedInto: { intoId: kept, intoNumber: into.mark.number }, deeds: [{ action: 'marks joined', reason: 'Reported twice' }] })
    expect(into.ceilingMarks.map(mark => mark.id)).not.toContain(twin)
    expect(await home.db.selectFrom('finding').select('id').where('subjectId', '=', twin).where('clearedAt', 'is', null).execute()).toEqual([])
    expect(await read(twin, 0, 1)).toMatchObject({ status: 409, body: { data: { code: 'mark-joined' } } })
    expect(await home.owner.patch(`/api/marks/${twin}`, { version: from.mark.version, change: { to: 'reopened', happenedOn: home.today, reason: 'x' } })).toMatchObject({ status: 409, body: { data: { code: 'mark-joined' } } })
    const again = await home.tenant.post<Receipt>(`/api/units/${home.unitId}/observations`, { kind: 'crack', roomId: home.bedroomId, sameAsMarkId: twin }, { headers: { 'idempotency-key': randomUUID() } })
    expect(again.body.mark.id).toBe(kept)
  })

  it('is undone: what came over goes home, what was added since stays', async () => {
    const [twin, kept] = [await openMark(), await openMark()]
    await read(twin, 30, 0.8)
    await join(twin, kept)
    await read(kept, 1, 1.1)
    expect((await undo(twin)).body).toMatchObject({ state: 'open', joinedInto: null })
    expect((await pageOf(twin)).readings.map(reading => [reading.value, reading.fromMark])).toEqual([[0.8, null]])
    expect((await pageOf(kept)).readings.map(reading => reading.value)).toEqual([1.1])
    expect((await undo(twin)).body.data.code).toBe('not-joined')
    expect((await join(twin, kept)).status).toBe(200)
    expect(await verifyChain(home.db, home.unitId)).toMatchObject({ kind: 'unbroken' })
  })

  it('puts the repairs of both on one line of time, and takes them apart again', async () => {
    const [twin, kept] = [await openMark(), await openMark()]
    for (const days of [60, 20]) await read(twin, days, 1)
    await repair(twin, 40)
    for (const days of [50, 10]) await read(kept, days, 1)
    await join(twin, kept)
    const joined = await pageOf(kept)
    expect(joined.readings.map(reading => reading.segment)).toEqual([1, 1, 2, 2])
    expect([joined.mark.segment, joined.repairs.length]).toEqual([2, 1])
    await undo(twin)
    expect([(await pageOf(kept)).readings.map(reading => reading.segment), (await pageOf(twin)).readings.map(reading => reading.segment), (await pageOf(twin)).mark.state]).toEqual([[1, 1], [1, 2], 'repaired'])
  })

  it('goes on over two steps, and goes back the same way', async () => {
    const [a, b, c] = [await openMark(), await openMark(), await openMark()]
    await read(a, 9, 1)
    await join(a, b)
    await join(b, c)
    expect((await pageOf(c)).readings).toMatchObject([{ fromMark: (await pageOf(a)).mark.number }])
    expect((await undo(a)).body.data.code).toBe('joined-further')
    expect([(await undo(b)).status, (await undo(a)).status, (await pageOf(a)).readings.length]).toEqual([200, 200, 1])
  })

  it('keeps what is wet wet, and danger standing', async () => {
    const [twin, kept] = [await openMark({ kind: 'stain', stain: 'damp', dangerSigns: ['bits-falling'] }), await openMark({ kind: 'stain', stain: 'dry' })]
    await join(twin, kept)
    expect((await pageOf(kept)).mark.stainState).toBe('damp')
    expect(await home.db.selectFrom('finding').select('severity').where('subjectId', '=', kept).where('rule', '=', 'danger-sign').where('clearedAt', 'is', null).execute()).toEqual([{ severity: 'urgent' }])
  })

  it('refuses what is not one and the same', async () => {
    const [crack, sag] = [await openMark(), await openMark({ kind: 'sag' })]
    const closed = await openMark()
    await home.owner.patch(`/api/marks/${closed}`, { version: 1, change: { to: 'closed', happenedOn: home.today, reason: 'x' } })
    for (const intoId of [sag, closed, crack, randomUUID()]) expect((await join(crack, intoId)).body.data.fields).toHaveProperty('intoId')
    expect((await join(crack, sag, { reason: ' ' })).body.data.fields).toHaveProperty('reason')
    expect((await join(crack, sag, { version: 99 })).status).toBe(409)
  })

  it('is for those who run the home', async () => {
    const [one, other] = [await openMark(), await openMark()]
    const people = [home.nobody, home.stranger, home.neighbour, home.engineer, home.tenant]
    expect(await Promise.all(people.map(async as => (await join(one, other, {}, as)).status))).toEqual([401, 404, 404, 403, 403])
    expect(await Promise.all(people.map(async as => (await undo(one, as)).status))).toEqual([401, 404, 404, 403, 403])
    expect(await Promise.all(people.map(async as => (await as.post(`/api/marks/${one}/splits`, {})).status))).toEqual([401, 404, 404, 403, 403])
  })
})

describe('splitting a mark', () => {
  it('makes a mark of its own of chosen readings and reports', async () => {
    const mark = await openMark()
    const first = (await read(mark, 40, 1)).body.id
    await read(mark, 30, 3)
    const reportId = (await pageOf(mark)).reports[0]!.id
    const made = await split(mark, { readingIds: [first], observationIds: [reportId] })
    expect(made.body).toMatchObject({ label: 'The other crack', roomId: home.hallId, kind: 'crack', firstSeenOn: addDays(home.today, -40), lastValue: 1 })
    expect([(await pageOf(made.body.id)).readings.length, (await pageOf(made.body.id)).reports.length, (await pageOf(mark)).readings.length]).toEqual([1, 1, 1])
    expect((await pageOf(mark)).deeds).toMatchObject([{ action: 'mark split', reason: 'Two cracks, not one' }])
    expect((await join(made.body.id, mark)).status).toBe(200)
    expect((await pageOf(mark)).readings).toHaveLength(2)
  })

  it('keeps the break of a repair in both', async () => {
    const mark = await openMark()
    const early = (await read(mark, 40, 1)).body.id
    await repair(mark, 30)
    const late = (await read(mark, 20, 0.2)).body.id
    await read(mark, 10, 0.3)
    const made = await split(mark, { readingIds: [early, late] })
    expect([(await pageOf(made.body.id)).readings.map(reading => reading.segment), (await pageOf(made.body.id)).mark.segment]).toEqual([[1, 2], 2])
  })

  it('refuses parts of another mark, everything, and nothing', async () => {
    const [mark, other] = [await openMark(), await openMark()]
    const mine = (await read(mark, 3, 1)).body.id
    const theirs = (await read(other, 3, 1)).body.id
    const reports = (await pageOf(mark)).reports.map(report => report.id)
    for (const given of [{ readingIds: [theirs] }, { readingIds: [mine], observationIds: reports }, {}, { readingIds: [randomUUID()] }]) expect((await split(mark, given)).body.data.fields).toHaveProperty('readingIds')
    expect((await split(mark, { observationIds: [randomUUID()] })).body.data.fields).toHaveProperty('observationIds')
    expect((await split(mark, { readingIds: [mine], roomId: home.otherRoomId })).body.data.fields).toHaveProperty('roomId')
  })
})

describe('the ceilings of a home', () => {
  it('show every room with its marks', async () => {
    const id = await openMark({ pin: { xShare: 0.25, yShare: 0.75 } })
    const { body } = await home.tenant.get<UnitCeilings>(`/api/units/${home.unitId}/ceilings`)
    expect(body.rooms).toMatchObject([{ name: 'Bedroom', lengthFt: 12, widthFt: 10 }, { name: 'Hall' }])
    expect(body.marks.find(mark => mark.id === id)).toMatchObject({ roomId: home.bedroomId, pinX: 0.25, pinY: 0.75, version: 1 })
    expect(body.unit).toMatchObject({ name: 'Flat 1', propertyName: 'Invented Row' })
    const people = [home.nobody, home.stranger, home.neighbour, home.trades, home.engineer]
    expect(await Promise.all(people.map(async as => (await as.get(`/api/units/${home.unitId}/ceilings`)).status))).toEqual([401, 404, 404, 404, 200])
  })
})
