import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { newId } from '../../server/utils/newId'
import { nowInstant } from '../../server/utils/clock'
import type { Overview } from '../../shared/types/overview'
import { addDays, addMonths } from '../../shared/utils/days'
import { inspectionDueOn, inventoryDueOn } from '../../shared/utils/upkeep/cadence'
import { signUp } from '../support/client'
import { plantCeilingHome, type CeilingHome } from '../support/ceilingHome'
import { startServer, type TestServer } from '../support/server'
import { newAttic } from './attic/atticInputs'

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

const look = async (as = home.owner) => (await as.get<Overview>('/api/overview')).body
const ownerId = async () => (await home.db.selectFrom('appUser').select('id').where('email', '=', home.ownerEmail).executeTakeFirstOrThrow()).id
const lastLooked = (at: string | null) => home.db.updateTable('membership').set({ lastLookedAt: at, lookedBeforeAt: null }).where('organisationId', '=', home.organisationId).execute()

describe('the overview', () => {
  it('of an organisation that has just begun is empty, not broken', async () => {
    const { client } = await signUp(server.url)
    const overview = await look(client)
    expect(overview).toEqual({
      today: expect.stringMatching(/^\d{4}-\d{2}-\d{2}$/), homes: 0, needDecision: 0, decisions: [], since: null, changes: [], upcoming: [],
      attics: { within: 0, near: 0, over: 0, hold: 0, unsurveyed: 0 }, marks: { 'active': 0, 'watch': 0, 'dormant': 0, 'too-few-readings': 0 },
      late: { readings: 0, jobs: 0 }, spentThisYearCents: 0,
    })
  })

  it('counts homes, attics by state, open marks by activity, late jobs and what was spent this year', async () => {
    const attic = await newAttic(home, 'Counted')
    await attic.survey()
    const held = await newAttic(home, 'Held')
    await held.survey({ conditions: ['wet'] })
    const job = {
      organisationId: home.organisationId, unitId: home.unitId, title: 'Invented job', description: '', priority: 'routine' as const, createdAt: nowInstant(), createdBy: await ownerId(),
    }
    await home.db.insertInto('job').values([
      { ...job, id: newId(), number: 901, state: 'planned', dueOn: addDays(home.today, -1) },
      { ...job, id: newId(), number: 902, state: 'planned', dueOn: home.today },
      { ...job, id: newId(), number: 903, state: 'done', dueOn: home.today, doneOn: home.today, costCents: 12_345 },
      { ...job, id: newId(), number: 904, state: 'done', dueOn: home.today, doneOn: addDays(home.today, -400), costCents: 99_999 },
    ]).execute()
    await home.tenant.post(`/api/units/${home.unitId}/observations`, { kind: 'crack', roomId: home.bedroomId, shape: 'wandering-line', widthComparison: 'card' }, { headers: { 'idempotency-key': newId() } })
    const overview = await look()
    expect(overview).toMatchObject({ homes: 2, attics: { within: 1, hold: 1, unsurveyed: 1, over: 0 }, marks: { 'too-few-readings': 1 }, late: { jobs: 1 }, spentThisYearCents: 12_345 })
  })

  it('puts what could hurt somebody first, then what waits longest', async () => {
    const inOther = async (name: string) => {
      const { body } = await home.owner.post<{ id: string }>(`/api/units/${home.otherUnitId}/attics`, { name })
      return body.id
    }
    const loaded = await newAttic(home, 'Not surveyed, loaded')
    await loaded.put()
    expect((await look()).decisions.map(decision => decision.unitId)).toEqual([home.unitId])
    const danger = await inOther('Over')
    await home.owner.post(`/api/attics/${danger}/items`, { ...(await loaded.read()).items.map(({ name, quantity }) => ({ name, quantity }))[0], catalogueKey: null, category: 'boxes', lowLb: 30, typicalLb: 30, highLb: 30, weightSource: 'weighed', belongsTo: 'tenant', fieldNumber: 1, xFt: 0, yFt: 0, lengthFt: 2, widthFt: 2, heightFt: 2, notes: '', placedOn: home.today })
    expect((await look()).decisions.map(decision => [decision.unitId, decision.severity])).toEqual([[home.unitId, 'attention'], [home.otherUnitId, 'attention']])
    await home.owner.post(`/api/attics/${danger}/surveys`, { ...(await surveyOf()), conditions: ['rotten'] })
    const { decisions, needDecision } = await look()
    expect(decisions.map(decision => [decision.unitId, decision.severity])).toEqual([[home.otherUnitId, 'urgent'], [home.unitId, 'attention']])
    expect(needDecision).toBe(2)
    expect(decisions[0]).toMatchObject({ unitName: 'Flat 2', propertyName: 'Invented Row', openFindings: 1, finding: { rule: 'contents-under-hold', subject: { kind: 'attic', id: danger } }, parts: { rooms: [{ name: 'Kitchen' }], attics: [{ name: 'Over' }], marks: [] } })
  })

  async function surveyOf() {
    const attic = await newAttic(home, 'Template')
    await attic.survey()
    return (await attic.read()).survey!
  }

  it('tells what others wrote since the last look, not what the asker wrote', async () => {
    await lastLooked(new Date(Date.now() - 9 * 3_600_000).toISOString())
    await home.tenant.post(`/api/units/${home.unitId}/observations`, { kind: 'crack', roomId: home.hallId, shape: 'wandering-line', widthComparison: 'card' }, { headers: { 'idempotency-key': newId() } })
    await newAttic(home, 'By the asker')
    const { changes, since } = await look()
    expect(since).toEqual(expect.any(String))
    const here = changes.find(change => change.unitId === home.unitId)!
    expect(here).toMatchObject({ unitName: 'Flat 1', propertyName: 'Invented Row', lastAt: expect.stringMatching(/^\d{4}-.*Z$/) })
    expect(here.actions).toContainEqual({ action: 'observation reported', count: expect.any(Number) })
    expect(here.actions.map(entry => entry.action)).not.toContain('attic added')
  })

  it('notes one look a visit: not again within eight hours', async () => {
    await lastLooked(null)
    expect((await look()).since).toBeNull()
    expect((await home.owner.post('/api/overview/looked')).body).toEqual({ noted: true })
    expect((await look()).since).toBeNull()
    const before = new Date(Date.now() - 9 * 3_600_000).toISOString()
    await lastLooked(before)
    await home.owner.post('/api/overview/looked')
    await home.owner.post('/api/overview/looked')
    expect((await look()).since).toBe(before)
  })

  it('lists what is due up to two weeks ahead, the late first, but nothing settled, further off, or of an archived home', async () => {
    await home.db.updateTable('mark').set({ nextReadingOn: null }).where('organisationId', '=', home.organisationId).execute()
    await home.db.deleteFrom('job').where('organisationId', '=', home.organisationId).execute()
    const due = { organisationId: home.organisationId, unitId: home.unitId, kind: 'inspection' as const, createdAt: nowInstant() }
    const add = (days: number, more: object = {}) => home.db.insertInto('dueItem').values({ ...due, id: newId(), subjectId: newId(), dueOn: addDays(home.today, days), ...more }).execute()
    await home.db.deleteFrom('dueItem').where('organisationId', '=', home.organisationId).execute()
    await add(3)
    await add(-4)
    await add(15)
    await add(1, { settledAt: nowInstant() })
    await add(2, { unitId: home.otherUnitId })
    await home.db.updateTable('unit').set({ archivedAt: nowInstant() }).where('id', '=', home.otherUnitId).execute()
    const { upcoming } = await look()
    expect(upcoming.map(item => item.dueOn)).toEqual([addDays(home.today, -4), addDays(home.today, 3)])
    expect(upcoming[0]).toMatchObject({ kind: 'inspection', unitId: home.unitId, unitName: 'Flat 1', propertyName: 'Invented Row' })
    await home.db.updateTable('unit').set({ archivedAt: null }).where('id', '=', home.otherUnitId).execute()
  })

  it('foresees readings, jobs, inventories and inspections by their cadence, each once', async () => {
    await home.db.deleteFrom('dueItem').where('organisationId', '=', home.organisationId).execute()
    const attic = await newAttic(home, 'Foreseen')
    const surveyedOn = addMonths(addDays(home.today, 5), -6)
    const placedOn = addMonths(addDays(home.today, 6), -12)
    await attic.survey({ surveyedOn })
    await attic.put({ placedOn })
    const mark = await home.db.selectFrom('mark').select('id').where('organisationId', '=', home.organisationId).limit(1).executeTakeFirstOrThrow()
    await home.db.updateTable('mark').set({ nextReadingOn: addDays(home.today, 7) }).where('id', '=', mark.id).execute()
    const jobId = newId()
    await home.db.insertInto('job').values({ id: jobId, organisationId: home.organisationId, unitId: home.unitId, number: 990, title: 'Invented job', dueOn: addDays(home.today, 8), createdBy: await ownerId(), createdAt: nowInstant() }).execute()
    await home.db.insertInto('dueItem').values({ id: newId(), organisationId: home.organisationId, unitId: home.unitId, kind: 'job', subjectId: jobId, dueOn: addDays(home.today, 8), createdAt: nowInstant() }).execute()
    const { upcoming } = await look()
    expect(upcoming.filter(due => [attic.id, mark.id, jobId].includes(due.subjectId)).map(due => [due.kind, due.dueOn])).toEqual([
      ['inspection', inspectionDueOn(surveyedOn, true)], ['inventory', inventoryDueOn(placedOn)], ['reading', addDays(home.today, 7)], ['job', addDays(home.today, 8)],
    ])
  })
})
