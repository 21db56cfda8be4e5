import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { judgeMark } from '../../../server/db/commands/judgeMark'
import { newId } from '../../../server/utils/newId'
import type { JobChoices, JobRow, JobView } from '../../../shared/types/job'
import { addMark, addReport, today } from './inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from './openHome'

let open: OpenServer
let home: OpenHome
type Page = { rows: JobRow[], next: string | null }

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
})
afterAll(() => open.close())

async function plan(body: object = {}): Promise<JobView> {
  const answer = await home.as.manager.post<JobView>('/api/jobs', { unitId: home.unitId, title: 'Look at the ceiling', ...body })
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return answer.body
}
const move = (client: OpenHome['as']['owner'], job: Pick<JobView, 'id' | 'version'>, body: object) => client.post<JobView & Refusal>(`/api/jobs/${job.id}/state`, { version: job.version, ...body })

describe('planning a job', () => {
  it('numbers it, works out the due day from the response time, and records it', async () => {
    const urgent = await plan({ priority: 'urgent' })
    expect(urgent).toMatchObject({ state: 'planned', dueOn: today(3), unitName: 'Upstairs', propertyName: '4 Alder Row', yearBuilt: 1962, assigneeName: null })
    expect((await plan()).dueOn).toBe(today(30))
    expect((await plan({ dueOn: today(5) })).dueOn).toBe(today(5))
    const row = await open.db.selectFrom('job').selectAll().where('id', '=', urgent.id).executeTakeFirstOrThrow()
    expect(row).toMatchObject({ createdBy: home.manager, number: urgent.number, organisationId: home.organisationId })
    expect(urgent.history.map(entry => entry.action)).toEqual(['job planned'])
  })

  it('tells whoever is given it, with the hazards of an old house', async () => {
    const job = await plan({ assigneeUserId: home.trades, scheduledOn: today(2) })
    expect(job).toMatchObject({ state: 'scheduled', assigneeName: 'Tor' })
    const mail = await open.db.selectFrom('message').selectAll().where('dedupeKey', '=', `job-assigned:${job.id}:${home.trades}`).executeTakeFirstOrThrow()
    expect(mail).toMatchObject({ mailClass: 'duty', userId: home.trades })
    const words = mail.textBody.replace(/\s+/g, ' ')
    expect(words).toContain('may hold asbestos')
    expect(words).toContain('may hold lead')
  })

  it('takes mark and clock from the finding it answers', async () => {
    const markId = await addMark(open.db, home)
    await addReport(open.db, home, markId, ['bits-falling'])
    await open.db.transaction().execute(trx => judgeMark(trx, { userId: null, name: 'Test' }, markId))
    const finding = await open.db.selectFrom('finding').selectAll().where('subjectId', '=', markId).where('rule', '=', 'danger-sign').executeTakeFirstOrThrow()
    const job = await plan({ findingId: finding.id, priority: 'danger' })
    expect(job).toMatchObject({ markId, findingRule: 'danger-sign', markLabel: 'Crack by the door', dueOn: new Date(new Date(finding.openedAt).getTime() + 86_400_000).toISOString().slice(0, 10) })
  })

  it('refuses what is not sound, and homes, marks and people of others', async () => {
    const other = await open.openHome()
    const mark = await addMark(open.db, other)
    const fieldsOf = async (body: object) => {
      const { status, body: refusal } = await home.as.owner.post<Refusal>('/api/jobs', body)
      expect(status).toBe(422)
      return Object.keys(refusal.data.fields ?? {}).sort()
    }
    expect(await fieldsOf({})).toEqual(['title', 'unitId'])
    expect(await fieldsOf({ unitId: home.unitId, title: ' ' })).toEqual(['title'])
    expect(await fieldsOf({ unitId: other.unitId, title: 'Theirs' })).toEqual(['unitId'])
    expect(await fieldsOf({ unitId: home.unitId, title: 'x', markId: mark })).toEqual(['markId'])
    expect(await fieldsOf({ unitId: home.unitId, title: 'x', findingId: newId() })).toEqual(['findingId'])
    expect(await fieldsOf({ unitId: home.unitId, title: 'x', assigneeUserId: other.trades })).toEqual(['assigneeUserId'])
    expect(await fieldsOf({ unitId: home.unitId, title: 'x', assigneeUserId: home.tenant })).toEqual(['assigneeUserId'])
    expect(await fieldsOf({ unitId: home.unitId, title: 'x', dueOn: 'soon' })).toEqual(['dueOn'])
    expect((await home.as.tenant.post('/api/jobs', {})).status).toBe(403)
    expect((await home.as.trades.post('/api/jobs', {})).status).toBe(403)
    expect((await home.as.nobody.post('/api/jobs', {})).status).toBe(401)
  })
})

describe('who sees which jobs', () => {
  it('shows staff all, trades their own, tenants those of their home without money, and strangers none', async () => {
    const mine = await plan({ title: 'For Tor', assigneeUserId: home.trades })
    await home.as.owner.patch(`/api/jobs/${mine.id}`, { version: mine.version, costCents: 12_500 })
    const listOf = async (client: OpenHome['as']['owner']) => (await client.get<Page>('/api/jobs?list=all')).body.rows
    expect((await listOf(home.as.owner)).find(job => job.id === mine.id)).toMatchObject({ costCents: 12_500 })
    expect((await listOf(home.as.trades)).every(job => job.assigneeName === 'Tor')).toBe(true)
    expect((await listOf(home.as.tenant)).find(job => job.id === mine.id)).toMatchObject({ costCents: null })
    expect(await listOf(home.as.otherTenant)).toEqual([])
    expect(await listOf(home.as.stranger)).toEqual([])
    expect((await home.as.nobody.get('/api/jobs')).status).toBe(401)

    const asTenant = (await home.as.tenant.get<JobView>(`/api/jobs/${mine.id}`)).body
    expect(asTenant).toMatchObject({ costCents: null, accessNotes: null, moves: [], history: [] })
    const unassigned = await plan()
    expect((await home.as.trades.get(`/api/jobs/${unassigned.id}`)).status).toBe(404)
    expect((await home.as.stranger.get(`/api/jobs/${mine.id}`)).status).toBe(404)
    expect((await home.as.otherTenant.get(`/api/jobs/${mine.id}`)).status).toBe(404)
    expect((await home.as.nobody.get(`/api/jobs/${mine.id}`)).status).toBe(401)
  })

  it('searches, narrows to late ones and pages', async () => {
    const late = await plan({ title: 'Very late gutter', dueOn: today(-3) })
    const rows = async (query: string) => (await home.as.owner.get<Page>(`/api/jobs?${query}`)).body.rows.map(job => job.id)
    expect(await rows('list=late')).toContain(late.id)
    expect(await rows('search=gutter')).toEqual([late.id])
    expect(await rows(`unit=${newId()}`)).toEqual([])
    expect((await home.as.owner.get('/api/jobs?list=some')).status).toBe(422)
    expect(await open.db.selectFrom('finding').select('rule').where('subjectId', '=', late.id).execute()).toEqual([{ rule: 'job-overdue' }])
    for (let n = 0; n < 55; n += 1) await plan({ title: `Paged ${n}`, dueOn: today(100 + n % 5) })
    const first = (await home.as.owner.get<Page>('/api/jobs?search=Paged')).body
    const second = (await home.as.owner.get<Page>(`/api/jobs?search=Paged&after=${first.next}`)).body
    expect(new Set([...first.rows, ...second.rows].map(job => job.id)).size).toBe(55)
    expect(second.next).toBeNull()
  })

  it('offers homes and people for the form to staff only', async () => {
    const { body } = await home.as.manager.get<JobChoices>('/api/jobs/choices')
    expect(body.units).toContainEqual({ id: home.unitId, name: 'Upstairs', propertyName: '4 Alder Row' })
    expect(body.assignees.map(person => person.name).sort()).toEqual(['Milo', 'Oona', 'Tor'])
    expect((await home.as.trades.get('/api/jobs/choices')).status).toBe(403)
    expect((await home.as.nobody.get('/api/jobs/choices')).status).toBe(401)
  })
})

describe('the way of a job', () => {
  it('goes from planned to confirmed, by the one who does it and the one who manages it', async () => {
    const job = await plan({ assigneeUserId: home.trades })
    expect((await home.as.trades.get<JobView>(`/api/jobs/${job.id}`)).body.moves).toEqual(['scheduled', 'done'])
    const scheduled = await move(home.as.trades, job, { to: 'scheduled', scheduledOn: today(1) })
    expect(scheduled.body).toMatchObject({ state: 'scheduled', scheduledOn: today(1) })
    const done = await move(home.as.trades, scheduled.body, { to: 'done', outcome: 'Two screws set, joint taped', costCents: 9_900 })
    expect(done.body).toMatchObject({ state: 'done', doneOn: today(), costCents: 9_900, moves: [] })
    expect((await move(home.as.trades, done.body, { to: 'confirmed' })).status).toBe(403)
    const confirmed = await move(home.as.owner, done.body, { to: 'confirmed' })
    expect(confirmed.body).toMatchObject({ state: 'confirmed', doneOn: today(), moves: [] })
    const actions = await open.db.selectFrom('recordEntry').select('action').where('subjectId', '=', job.id).orderBy('seq').execute()
    expect(actions.map(entry => entry.action)).toEqual(['job planned', 'job scheduled', 'job done', 'job confirmed'])
  })

  it('refuses an impossible change with those that are possible', async () => {
    const job = await plan()
    const refused = await move(home.as.owner, job, { to: 'confirmed' })
    expect([refused.status, refused.body.data.code, refused.body.data.allowed]).toEqual([409, 'impossible-change', ['scheduled', 'done', 'cancelled']])
    const cancelled = await move(home.as.owner, job, { to: 'cancelled', outcome: 'The tenant mended it' })
    expect(cancelled.body).toMatchObject({ state: 'cancelled', moves: ['planned'] })
    expect((await move(home.as.owner, cancelled.body, { to: 'done' })).body.data).toMatchObject({ allowed: ['planned'] })
  })

  it('asks for the day, the reason and a day that has been', async () => {
    const job = await plan()
    const fieldOf = async (body: object) => Object.keys((await move(home.as.owner, job, body)).body.data?.fields ?? {})
    expect(await fieldOf({ to: 'scheduled' })).toEqual(['scheduledOn'])
    expect(await fieldOf({ to: 'cancelled' })).toEqual(['outcome'])
    expect(await fieldOf({ to: 'done', doneOn: today(1) })).toEqual(['doneOn'])
    expect(await fieldOf({ to: 'gone' })).toEqual(['to'])
    expect(await fieldOf({ to: 'done', costCents: -1 })).toEqual(['costCents'])
    expect(await fieldOf({ to: 'done', costCents: 1.5 })).toEqual(['costCents'])
  })

  it('is shut to tenants, strangers, people signed out and trades it was not given to', async () => {
    const job = await plan()
    expect((await move(home.as.tenant, job, { to: 'done' })).status).toBe(403)
    expect((await move(home.as.stranger, job, { to: 'done' })).status).toBe(404)
    expect((await move(home.as.trades, job, { to: 'done' })).status).toBe(404)
    expect((await move(home.as.nobody, job, { to: 'done' })).status).toBe(401)
  })

  it('settles the reports of a mark: danger only by a job against the danger', async () => {
    const markId = await addMark(open.db, home)
    const calm = await addReport(open.db, home, markId)
    const danger = await addReport(open.db, home, markId, ['bits-falling'])
    await open.db.transaction().execute(trx => judgeMark(trx, { userId: null, name: 'Test' }, markId))
    const times = async (id: string) => open.db.selectFrom('observation').select(['startedAt', 'correctedAt']).where('id', '=', id).executeTakeFirstOrThrow()
    const finish = async (priority: string) => {
      const done = await move(home.as.owner, await plan({ markId, priority }), { to: 'done' })
      await move(home.as.owner, done.body, { to: 'confirmed' })
    }
    await finish('routine')
    expect(await times(calm)).toEqual({ startedAt: expect.any(String), correctedAt: expect.any(String) })
    expect(await times(danger)).toEqual({ startedAt: null, correctedAt: null })
    await finish('danger')
    expect(await times(danger)).toEqual({ startedAt: expect.any(String), correctedAt: expect.any(String) })
    expect(await open.db.selectFrom('finding').select('id').where('subjectId', '=', markId).where('rule', '=', 'danger-sign').where('clearedAt', 'is', null).execute()).toEqual([])
  })
})

describe('editing a job', () => {
  it('keeps the changes, and shows both versions to the second of two people', async () => {
    const job = await plan()
    const first = await home.as.owner.patch<JobView>(`/api/jobs/${job.id}`, { version: job.version, title: 'Look at the ceiling and the attic', assigneeUserId: home.trades })
    expect(first.body).toMatchObject({ title: 'Look at the ceiling and the attic', assigneeName: 'Tor', version: job.version + 1 })
    const second = await home.as.manager.patch<Refusal>(`/api/jobs/${job.id}`, { version: job.version, title: 'Another title' })
    expect([second.status, second.body.data.code]).toEqual([409, 'changed-meanwhile'])
    expect(second.body.data.theirs).toMatchObject({ title: 'Look at the ceiling and the attic' })
    expect((await home.as.owner.patch(`/api/jobs/${job.id}`, { version: 2, state: 'confirmed' })).status).toBe(422)
    expect((await home.as.trades.patch(`/api/jobs/${job.id}`, { version: 2, title: 'x' })).status).toBe(403)
    expect((await home.as.tenant.patch(`/api/jobs/${job.id}`, { version: 2, title: 'x' })).status).toBe(403)
    expect((await home.as.stranger.patch(`/api/jobs/${job.id}`, { version: 2, title: 'x' })).status).toBe(404)
    expect((await home.as.nobody.patch(`/api/jobs/${job.id}`, { version: 2, title: 'x' })).status).toBe(401)
  })
})
