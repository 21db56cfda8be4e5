import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { judgeAttic } from '../../../server/db/commands/judgeAttic'
import { judgeMark } from '../../../server/db/commands/judgeMark'
import { newId } from '../../../server/utils/newId'
import type { FindingRow, FindingView } from '../../../shared/types/findingView'
import { addItem, addMark, addReport, addSurvey, today } from './inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from './openHome'

let open: OpenServer
let home: OpenHome
let markId: string

const actor = { userId: null, name: 'Test' }
type Page = { rows: FindingRow[], next: string | null }

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
  await addSurvey(open.db, home)
  await addItem(open.db, home, 5500)
  markId = await addMark(open.db, home, { createdDaysAgo: 5 })
  await addReport(open.db, home, markId, ['bits-falling'])
  await open.db.transaction().execute(async (trx) => {
    await judgeAttic(trx, actor, home.atticId)
    await judgeMark(trx, actor, markId)
  })
})
afterAll(() => open.close())

const findingOf = async (rule: string) => (await home.as.owner.get<Page>('/api/findings?list=all')).body.rows.find(row => row.finding.rule === rule)!

describe('GET /api/findings', () => {
  it('lists what waits for a person, gravest first, with where it is', async () => {
    const { status, body } = await home.as.manager.get<Page>('/api/findings')
    expect(status).toBe(200)
    const ranks = body.rows.map(row => ['urgent', 'attention', 'notice'].indexOf(row.finding.severity))
    expect(ranks).toEqual([...ranks].sort())
    expect(body.rows.map(row => row.finding.rule)).toEqual(expect.arrayContaining(['danger-sign', 'attic-load', 'new-mark-under-load']))
    expect(body.rows.find(row => row.finding.rule === 'danger-sign')).toMatchObject({ propertyName: '4 Alder Row', unitName: 'Upstairs', subjectLabel: 'Crack by the door', unitId: home.unitId })
  })

  it('narrows by severity, home and words, and pages without losing or repeating any', async () => {
    const only = async (query: string) => (await home.as.owner.get<Page>(`/api/findings?${query}`)).body.rows
    expect((await only('severity=urgent')).every(row => row.finding.severity === 'urgent')).toBe(true)
    expect(await only(`unit=${newId()}`)).toEqual([])
    expect((await only('search=loft')).map(row => row.subjectLabel)).toEqual(expect.arrayContaining(['Loft']))
    expect(await only('search=100%25')).toEqual([])
    expect(await only('list=cleared')).toEqual([])
    const other = await open.openHome()
    for (let n = 0; n < 60; n += 1) await open.db.insertInto('finding').values({
      id: newId(), organisationId: other.organisationId, unitId: other.unitId, rule: 'inspection-overdue', subjectKind: 'attic', subjectId: newId(), severity: n % 2 ? 'notice' : 'attention',
      adviceCode: 'inspect', evidence: JSON.stringify({ dueOn: today(), daysLate: 1 }), openedAt: new Date(2026, 1, 1, n).toISOString(), changedAt: new Date(2026, 1, 1, n % 7).toISOString(),
    }).execute()
    const first = (await other.as.owner.get<Page>('/api/findings')).body
    const second = (await other.as.owner.get<Page>(`/api/findings?after=${first.next}`)).body
    expect([first.rows.length, second.rows.length, second.next]).toEqual([50, 10, null])
    expect(new Set([...first.rows, ...second.rows].map(row => row.id)).size).toBe(60)
  })

  it('of equal gravity and rule comes first what hangs heavier and higher over a bed, then what waits longest', async () => {
    const other = await open.openHome()
    const rooms = [['plaster-on-lath', 96, true], ['gypsum-half-inch', 96, false], ['plaster-on-lath', 120, true]] as const
    const labels: string[] = []
    for (const [n, [ceilingFinish, ceilingHeightIn, isBedroom]] of rooms.entries()) {
      const mark = await addMark(open.db, other, { createdDaysAgo: 5 })
      const roomId = newId()
      await open.db.insertInto('room').values({ id: roomId, organisationId: other.organisationId, unitId: other.unitId, name: `Room ${n}`, sort: n, ceilingFinish, ceilingHeightIn, isBedroom, createdAt: new Date().toISOString() }).execute()
      await open.db.updateTable('mark').set({ roomId, label: `Over ${n}` }).where('id', '=', mark).execute()
      for (const [rule, day] of [['new-mark', 9], ['reading-overdue', 3]] as const) await open.db.insertInto('finding').values({
        id: newId(), organisationId: other.organisationId, unitId: other.unitId, rule, subjectKind: 'mark', subjectId: mark, severity: 'notice', adviceCode: 'take-reading',
        evidence: JSON.stringify({ dueOn: today(), daysLate: 1 }), openedAt: new Date(2026, 1, day - n).toISOString(), changedAt: new Date(2026, 1, 9).toISOString(),
      }).execute()
      labels.push(`Over ${n}`)
    }
    const shown = (await other.as.owner.get<Page>('/api/findings')).body.rows.map(row => [row.finding.rule, row.subjectLabel])
    expect(shown).toEqual([...['new-mark', 'reading-overdue'].flatMap(rule => [labels[2], labels[0], labels[1]].map(label => [rule, label]))])
    expect((await other.as.owner.get<Page>('/api/findings?rule=new-mark')).body.rows).toHaveLength(3)
    expect((await other.as.owner.get<Page>(`/api/findings?property=${newId()}`)).body.rows).toEqual([])
    expect((await other.as.owner.get('/api/findings?rule=nonsense')).status).toBe(422)
  })

  it('refuses people signed out, roles without it, and unsound questions', async () => {
    expect((await home.as.nobody.get('/api/findings')).status).toBe(401)
    expect((await home.as.tenant.get('/api/findings')).status).toBe(403)
    expect((await home.as.trades.get('/api/findings')).status).toBe(403)
    expect((await home.as.owner.get('/api/findings?list=everything')).status).toBe(422)
    expect((await home.as.owner.get('/api/findings?after=spoilt')).status).toBe(422)
    expect((await home.as.owner.get('/api/findings?unit=house')).status).toBe(422)
  })

  it('shows nothing of another organisation', async () => {
    expect((await home.as.stranger.get<Page>('/api/findings?list=all')).body.rows).toEqual([])
  })
})

describe('GET /api/findings/[findingId]', () => {
  it('says why with its numbers, what it is about, what happened, and until when it may rest', async () => {
    const { id } = await findingOf('attic-load')
    const { status, body } = await home.as.owner.get<FindingView>(`/api/findings/${id}`)
    expect(status).toBe(200)
    expect(body.finding).toMatchObject({ rule: 'attic-load', severity: 'urgent', evidence: { totalLb: 5500, state: 'over' }, adviceCode: 'stop-adding-and-unload' })
    expect(body).toMatchObject({ atticId: home.atticId, markId: null, lookAgainUntilOn: today(30), jobs: [] })
    expect(body.events.map(event => event.kind)).toEqual(['opened'])
    expect(body.abilities).toContain('acknowledge finding')
    expect(new Date(body.correctBy).getTime() - new Date(body.finding.openedAt).getTime()).toBe(72 * 3_600_000)
  })

  it('is a 404 for strangers and for ids that are none, 403 for a tenant of the home, 401 signed out', async () => {
    const { id } = await findingOf('attic-load')
    expect((await home.as.stranger.get(`/api/findings/${id}`)).status).toBe(404)
    expect((await home.as.otherTenant.get(`/api/findings/${id}`)).status).toBe(404)
    expect((await home.as.owner.get('/api/findings/none')).status).toBe(404)
    expect((await home.as.owner.get(`/api/findings/${newId()}`)).status).toBe(404)
    expect((await home.as.tenant.get(`/api/findings/${id}`)).status).toBe(403)
    expect((await home.as.nobody.get(`/api/findings/${id}`)).status).toBe(401)
  })
})

describe('acknowledging a finding', () => {
  it('keeps the reason and the day to look again, in the row, the events and the record, and can be taken back', async () => {
    const { id, version } = await findingOf('new-mark-under-load')
    const answer = await home.as.manager.post<FindingView>(`/api/findings/${id}/acknowledgement`, { reason: ' Seen it, reading planned ', lookAgainOn: today(14), version })
    expect(answer.status).toBe(200)
    expect(answer.body.finding).toMatchObject({ acknowledgedReason: 'Seen it, reading planned', lookAgainOn: today(14) })
    expect(answer.body.acknowledgedByName).toBe('Milo')
    const row = await open.db.selectFrom('finding').selectAll().where('id', '=', id).executeTakeFirstOrThrow()
    expect(row).toMatchObject({ acknowledgedBy: home.manager, lookAgainOn: today(14), clearedAt: null, version: version + 1 })
    expect((await open.db.selectFrom('recordEntry').select('action').where('subjectId', '=', id).orderBy('seq', 'desc').execute())[0]).toEqual({ action: 'finding acknowledged' })
    expect((await home.as.owner.get<Page>('/api/findings')).body.rows.map(waiting => waiting.id)).not.toContain(id)
    expect((await home.as.owner.get<Page>('/api/findings?list=acknowledged')).body.rows.map(waiting => waiting.id)).toContain(id)

    const back = await home.as.manager.remove<FindingView>(`/api/findings/${id}/acknowledgement`)
    expect(back.body.finding).toMatchObject({ acknowledgedAt: null, lookAgainOn: null })
    expect(back.body.events.map(event => event.kind)).toEqual(['opened', 'acknowledged', 'returned'])
  })

  it('lets a danger sign rest a week at most, and nothing until today', async () => {
    const { id, version } = await findingOf('danger-sign')
    const refusedFor = async (body: object) => {
      const { status, body: refusal } = await home.as.owner.post<Refusal>(`/api/findings/${id}/acknowledgement`, { version, ...body })
      expect(status).toBe(422)
      return Object.keys(refusal.data.fields ?? {})
    }
    expect(await refusedFor({ reason: 'Later', lookAgainOn: today(8) })).toEqual(['lookAgainOn'])
    expect(await refusedFor({ reason: 'Later', lookAgainOn: today() })).toEqual(['lookAgainOn'])
    expect(await refusedFor({ reason: '  ', lookAgainOn: today(2) })).toEqual(['reason'])
    expect(await refusedFor({ lookAgainOn: '2026-02-31', reason: 'x' })).toEqual(['lookAgainOn'])
    expect(await refusedFor({ reason: 'Later', lookAgainOn: today(2), severity: 'notice' })).not.toEqual([])
  })

  it('refuses a stale version with what stands now, strangers, tenants and people signed out', async () => {
    const { id, version } = await findingOf('danger-sign')
    const body = { reason: 'Seen', lookAgainOn: today(3), version: version + 5 }
    const clash = await home.as.owner.post<Refusal>(`/api/findings/${id}/acknowledgement`, body)
    expect([clash.status, clash.body.data.code]).toEqual([409, 'changed-meanwhile'])
    expect(clash.body.data.theirs).toMatchObject({ id, version })
    expect((await home.as.stranger.post(`/api/findings/${id}/acknowledgement`, body)).status).toBe(404)
    expect((await home.as.tenant.post(`/api/findings/${id}/acknowledgement`, body)).status).toBe(403)
    expect((await home.as.nobody.post(`/api/findings/${id}/acknowledgement`, body)).status).toBe(401)
    expect((await home.as.nobody.remove(`/api/findings/${id}/acknowledgement`)).status).toBe(401)
    expect((await home.as.stranger.remove(`/api/findings/${id}/acknowledgement`)).status).toBe(404)
    expect((await home.as.tenant.remove(`/api/findings/${id}/acknowledgement`)).status).toBe(403)
  })
})
