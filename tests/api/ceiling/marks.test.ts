import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { newId } from '../../../server/utils/newId'
import type { MarkFacts, MarkPage, MarkRow } from '../../../shared/types/markPage'
import type { Receipt } from '../../../shared/types/receipt'
import { addDays } from '../../../shared/utils/days'
import { plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
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

interface Refusal { message: string, data: { code: string, fields?: Record<string, string>, theirs?: MarkFacts } }
interface Page { rows: MarkRow[], next: string | null }

async function openMark(body: object = {}, { as = home.tenant, unitId = home.unitId, roomId = home.bedroomId }: { as?: CeilingHome['owner'], unitId?: string, roomId?: string } = {}) {
  const { body: receipt } = await as.post<Receipt>(`/api/units/${unitId}/observations`, { kind: 'crack', roomId, ...body }, { headers: { 'idempotency-key': randomUUID() } })
  return receipt.mark
}
const read = (markId: string, takenOn: string, value: number) =>
  home.owner.post(`/api/marks/${markId}/readings`, { takenOn, method: 'gauge-card', value }, { headers: { 'idempotency-key': randomUUID() } })
const edit = (markId: string, body: object, as = home.owner) => as.patch<MarkFacts & Refusal>(`/api/marks/${markId}`, body)
const pageOf = async (markId: string, as = home.owner) => (await as.get<MarkPage>(`/api/marks/${markId}`)).body

describe('a mark\'s page', () => {
  it('says what is known: facts, readings, trend, reports, clues, load above', async () => {
    const mark = await openMark({ shape: 'straight-line', place: 'middle', recentEvents: ['heavy-rain'], widthMm: 1, widthMethod: 'ruler' })
    const itemId = newId()
    await home.db.insertInto('atticItem').values({
      id: itemId, organisationId: home.organisationId, unitId: home.unitId, atticId: home.atticId, name: 'Boxes', category: 'boxes', quantity: 1, lowLb: 100, typicalLb: 120, highLb: 150, weightSource: 'estimate',
      xFt: 0, yFt: 0, lengthFt: 2, widthFt: 2, placedOn: addDays(home.today, -90), createdAt: new Date().toISOString(),
    }).execute()
    await home.db.insertInto('loadEvent').values({
      id: newId(), organisationId: home.organisationId, unitId: home.unitId, atticId: home.atticId, itemId, kind: 'in', happenedOn: addDays(home.today, -90),
      deltaLb: 120, totalAfterLb: 120, detail: '{}', recordedBy: home.tenantId, recordedAt: new Date().toISOString(),
    }).execute()
    for (let week = 1; week <= 4; week++) await read(mark.id, addDays(home.today, -40 * week), 1)
    const page = await pageOf(mark.id)
    expect(page).toMatchObject({
      mark: { id: mark.id, number: mark.number, kind: 'crack', state: 'open', version: 1 }, room: { name: 'Bedroom', lengthFt: 12 }, unit: { name: 'Flat 1' },
      property: { name: 'Invented Row', yearBuilt: 1961 }, attic: { name: 'Main attic' }, trend: { kind: 'too few readings', readingCount: 5, missing: 1 },
      loadSteps: [{ on: addDays(home.today, -90), totalLb: 120 }], today: home.today, timeZone: 'UTC', rooms: [{ name: 'Bedroom' }, { name: 'Hall' }],
    })
    expect(page.readings.map(reading => reading.takenOn)).toEqual([-160, -120, -80, -40, 0].map(days => addDays(home.today, days)))
    expect(page.reports).toMatchObject([{ reportedBy: 'Tessa Invented', answers: { recentEvents: ['heavy-rain'] } }])
    expect(page.clues.map(clue => clue.cause)).toContain('board-joint')
    expect(page.abilities).toContain('edit mark')
  })

  it('measures a trend that the readings hold, in the newest segment only', async () => {
    const mark = await openMark()
    for (let month = 0; month < 8; month++) await read(mark.id, addDays(home.today, -30 * (8 - month)), 1 + month * 0.8)
    const before = await pageOf(mark.id)
    // The slope the readings were made with: 0.8 mm every 30 days, in a year of 365.25 days.
    expect(before.trend).toMatchObject({ kind: 'measured', activity: 'active', readingCount: 8 })
    expect(before.trend.kind === 'measured' && before.trend.slopePerYear).toBeCloseTo(0.8 * 365.25 / 30, 6)
    expect(before.mark).toMatchObject({ activity: 'active', slopePerYear: expect.closeTo(9.74, 2) })
    await edit(mark.id, { version: before.mark.version, change: { to: 'repaired', happenedOn: home.today, reason: 'Filled' } })
    const after = await pageOf(mark.id)
    expect(after.trend).toMatchObject({ kind: 'too few readings', readingCount: 0 })
    expect(after.readings).toHaveLength(8)
    expect(after.mark).toMatchObject({ state: 'repaired', segment: 2, activity: 'too-few-readings' })
  })

  it('is seen by those who may see the home', async () => {
    const { id } = await openMark()
    const status = async (as: CeilingHome['owner']) => (await as.get(`/api/marks/${id}`)).status
    expect([await status(home.nobody), await status(home.stranger), await status(home.neighbour), await status(home.trades), await status(home.engineer), await status(home.tenant)]).toEqual([401, 404, 404, 404, 200, 200])
    expect((await home.owner.get('/api/marks/nonsense')).status).toBe(404)
  })
})

describe('editing a mark', () => {
  it('changes facts, records them and raises the version', async () => {
    const mark = await openMark()
    const { status, body } = await edit(mark.id, { version: 1, label: 'Crack by the lamp', roomId: home.hallId, pin: { xShare: 0.1, yShare: 0.2 }, notes: 'Seen at move-in' })
    expect(status).toBe(200)
    expect(body).toMatchObject({ label: 'Crack by the lamp', roomId: home.hallId, pinX: 0.1, pinY: 0.2, version: 2 })
    const entry = await home.db.selectFrom('recordEntry').select(['before', 'after']).where('subjectId', '=', mark.id).where('action', '=', 'mark edited').executeTakeFirstOrThrow()
    expect(entry).toMatchObject({ before: { label: 'Crack, Bedroom', pinX: 0.5 }, after: { label: 'Crack by the lamp', pinX: 0.1 } })
  })

  it('answers two people who edit at once with both versions', async () => {
    const mark = await openMark()
    await edit(mark.id, { version: 1, label: 'First' })
    expect(await edit(mark.id, { version: 1, label: 'Second' })).toMatchObject({ status: 409, body: { data: { code: 'changed-meanwhile', theirs: { label: 'First', version: 2 } } } })
    expect(await edit(mark.id, { version: 1, change: { to: 'closed', happenedOn: home.today, reason: 'x' } })).toMatchObject({ status: 409, body: { data: { code: 'changed-meanwhile' } } })
  })

  it('walks through repaired, reopened and closed, each with day and reason in the record', async () => {
    const mark = await openMark()
    const change = (to: string, version: number) => edit(mark.id, { version, change: { to, happenedOn: home.today, reason: `because ${to}` } })
    expect((await change('reopened', 1)).body.data.code).toBe('state-does-not-allow')
    expect((await change('repaired', 1)).body).toMatchObject({ state: 'repaired', segment: 2, version: 2 })
    expect((await change('repaired', 2)).status).toBe(409)
    expect((await change('reopened', 2)).body).toMatchObject({ state: 'open', segment: 2 })
    expect((await change('closed', 3)).body).toMatchObject({ state: 'closed', nextReadingOn: null })
    const entries = await home.db.selectFrom('recordEntry').select(['action', 'after']).where('subjectId', '=', mark.id).where('action', '!=', 'mark opened').orderBy('seq').execute()
    expect(entries.map(entry => entry.action)).toEqual(['mark repaired', 'mark reopened', 'mark closed'])
    expect(entries[2]!.after).toMatchObject({ happenedOn: home.today, reason: 'because closed' })
    const report = await home.db.selectFrom('observation').select(['startedAt', 'correctedAt']).where('markId', '=', mark.id).executeTakeFirstOrThrow()
    expect(report).toEqual({ startedAt: expect.any(String), correctedAt: expect.any(String) })
    expect(await home.db.selectFrom('finding').select('id').where('subjectId', '=', mark.id).where('clearedAt', 'is', null).execute()).toEqual([])
  })

  it('keeps a danger report standing through a repair, and does not close over it', async () => {
    const mark = await openMark({ dangerSigns: ['fast-widening'] })
    const change = (to: string, version: number) => edit(mark.id, { version, change: { to, happenedOn: home.today, reason: 'Filled' } })
    const standing = () => home.db.selectFrom('finding').select('id').where('subjectId', '=', mark.id).where('rule', '=', 'danger-sign').where('clearedAt', 'is', null).execute()
    expect((await change('repaired', 1)).status).toBe(200)
    expect(await standing()).toHaveLength(1)
    expect((await change('closed', 2)).body.data.code).toBe('danger-stands')
    const report = await home.db.selectFrom('observation').select('id').where('markId', '=', mark.id).executeTakeFirstOrThrow()
    await home.owner.patch(`/api/observations/${report.id}`, { step: 'corrected', note: 'An engineer looked and found it sound' })
    expect(await standing()).toHaveLength(0)
    expect((await change('closed', 2)).status).toBe(200)
  })

  it.each<[string, () => object, string]>([
    ['nothing to change', () => ({ version: 1 }), 'form'],
    ['no version', () => ({ label: 'x' }), 'version'],
    ['an empty name', () => ({ version: 1, label: ' ' }), 'label'],
    ['a room next door', () => ({ version: 1, roomId: home.otherRoomId }), 'roomId'],
    ['an attic that is not there', () => ({ version: 1, atticId: randomUUID() }), 'atticId'],
    ['a picture of another kind', () => ({ version: 1, shape: 'ring' }), 'shape'],
    ['a day to come', () => ({ version: 1, firstSeenOn: '2199-01-01' }), 'firstSeenOn'],
    ['a change on a day to come', () => ({ version: 1, change: { to: 'closed', happenedOn: '2199-01-01', reason: 'x' } }), 'change.happenedOn'],
    ['a change without a reason', () => ({ version: 1, change: { to: 'closed', happenedOn: '2026-01-01', reason: '' } }), 'change.reason'],
    ['a field that is not for people', () => ({ version: 1, activity: 'dormant' }), 'form'],
  ])('refuses %s at its field', async (_what, make, field) => {
    const { status, body } = await edit((await openMark()).id, make())
    expect([status, Object.keys(body.data.fields!)]).toEqual([422, [field]])
  })

  it('is for those who run the home', async () => {
    const { id } = await openMark()
    const status = async (as: CeilingHome['owner']) => (await edit(id, { version: 1, label: 'Mine' }, as)).status
    expect([await status(home.nobody), await status(home.stranger), await status(home.neighbour), await status(home.tenant), await status(home.engineer)]).toEqual([401, 404, 404, 403, 403])
  })
})

describe('the list of marks', () => {
  it('filters, searches and pages without losing or repeating one', async () => {
    const near = await openMark({ kind: 'stain', stain: 'dripping', shape: 'ring' }, { as: home.owner, unitId: home.otherUnitId, roomId: home.otherRoomId })
    const all = (await home.owner.get<Page>('/api/marks?limit=200')).body.rows
    expect(all[0]).toMatchObject({ id: near.id, unitName: 'Flat 2', roomName: 'Kitchen', stainState: 'dripping', propertyName: 'Invented Row' })
    for (const sort of ['risk', 'newest', 'due']) {
      const seen: string[] = []
      let after: string | null = null
      do {
        const { body }: { body: Page } = await home.owner.get<Page>(`/api/marks?limit=3&sort=${sort}${after ? `&after=${encodeURIComponent(after)}` : ''}`)
        seen.push(...body.rows.map(row => row.id))
        after = body.next
      } while (after)
      expect(seen).toHaveLength(all.length)
      expect(new Set(seen).size).toBe(all.length)
    }
    const list = async (query: string) => (await home.owner.get<Page>(`/api/marks?${query}`)).body.rows
    expect((await list('kind=stain,sag')).map(row => row.kind)).toEqual(['stain'])
    expect((await list('state=closed')).every(row => row.state === 'closed')).toBe(true)
    expect((await list('activity=active')).every(row => row.activity === 'active')).toBe(true)
    expect((await list(`unit=${home.otherUnitId}`)).map(row => row.id)).toEqual([near.id])
    expect((await list('search=flat%202')).map(row => row.id)).toEqual([near.id])
    expect((await list(`search=${near.number}`)).map(row => row.id)).toContain(near.id)
    expect(await list('search=%25')).toEqual([])
    await home.db.updateTable('mark').set({ nextReadingOn: addDays(home.today, -1) }).where('id', '=', near.id).execute()
    expect((await list('due=late')).map(row => row.id)).toEqual([near.id])
  })

  it('shows a person the marks of their own homes only', async () => {
    const mine = await openMark()
    const units = async (as: CeilingHome['owner']) => [...new Set((await as.get<Page>('/api/marks?limit=200')).body.rows.map(row => row.unitId))]
    expect(await units(home.tenant)).toEqual([home.unitId])
    expect(await units(home.engineer)).toEqual([home.unitId])
    expect(await units(home.stranger)).toEqual([])
    expect((await home.neighbour.get<Page>(`/api/marks?unit=${home.unitId}`)).body.rows).toEqual([])
    expect((await home.tenant.get<Page>('/api/marks?sort=newest&limit=1')).body.rows[0]!.id).toBe(mine.id)
    expect([(await home.nobody.get('/api/marks')).status, (await home.trades.get('/api/marks')).status]).toEqual([401, 403])
  })

  it.each(['kind=ghost', 'after=spoilt', 'after=WzFd', 'limit=0', 'limit=9999', 'unit=here', 'sort=colour', 'nonsense=1'])('refuses ?%s', async (query) => {
    expect((await home.owner.get(`/api/marks?${query}`)).status).toBe(422)
  })
})
