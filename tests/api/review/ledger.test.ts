import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { judgeMark } from '../../../server/db/commands/judgeMark'
import type { HindsightRow, LedgerPage, LimitsRehearsalAnswer } from '../../../shared/types/hindsight'
import { OUR_LIMITS, type LimitsView } from '../../../shared/types/limits'
import { addMark, addReading } from './inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from './openHome'
import { bringEngineer, expectGuarded, expectUnsound } from '../homes/guarded'

let open: OpenServer
let home: OpenHome
let markId: string
let findingId: string

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
  markId = await addMark(open.db, home, { createdDaysAgo: 60 })
  for (const [daysAgo, value] of [[60, 1], [40, 1], [20, 1], [1, 2.4]] as const) await addReading(open.db, home, markId, daysAgo, value)
  await open.db.transaction().execute(trx => judgeMark(trx, { userId: null, name: 'Test' }, markId))
  findingId = (await open.db.selectFrom('finding').select('id').where('subjectId', '=', markId).where('rule', '=', 'mark-sudden').executeTakeFirstOrThrow()).id
})
afterAll(() => open.close())

const ledger = async (query = '', as = home.as.owner) => (await as.get<LedgerPage>(`/api/ledger${query}`)).body
const judge = (outcome: string, reason: string) => home.as.manager.post<{ rows: HindsightRow[] }>(`/api/findings/${findingId}/hindsight`, { outcome, reason })

describe('the ledger of findings judged right or wrong', () => {
  it('counts what was not judged yet', async () => {
    const { counts, rows, next } = await ledger()
    expect(counts.find(count => count.rule === 'mark-sudden')).toEqual({ rule: 'mark-sudden', opened: 1, right: 0, wrong: 0, notJudged: 1 })
    expect(rows.find(row => row.findingId === findingId)).toMatchObject({ subjectLabel: 'Crack by the door', unitName: 'Upstairs', outcome: null, judgedByName: null })
    expect(next).toBeNull()
  })

  it('keeps who said what, when and why; the newest counts, earlier ones stay, and the record has both', async () => {
    expect((await judge('right', 'The plaster came down')).status).toBe(200)
    await judge('right', 'The plaster came down')
    const { body } = await judge('wrong', ' Read on the wrong line ')
    expect(body.rows.map(({ outcome, reason, judgedByName }) => [outcome, reason, judgedByName])).toEqual([['wrong', 'Read on the wrong line', 'Milo'], ['right', 'The plaster came down', 'Milo']])
    expect((await home.as.owner.get<typeof body>(`/api/findings/${findingId}/hindsight`)).body).toEqual(body)
    const stored = await open.db.selectFrom('findingHindsight').selectAll().where('findingId', '=', findingId).execute()
    expect(stored.map(row => row.judgedBy)).toEqual([home.manager, home.manager])
    const entries = await open.db.selectFrom('recordEntry').select('action').where('subjectId', '=', findingId).orderBy('seq').execute()
    expect(entries.map(entry => entry.action)).toEqual(['finding opened', 'finding judged right', 'finding judged wrong'])
    expect((await ledger()).counts.find(count => count.rule === 'mark-sudden')).toMatchObject({ right: 0, wrong: 1, notJudged: 0 })
  })

  it('narrows by outcome, rule and home', async () => {
    const ids = async (query: string) => (await ledger(query)).rows.map(row => row.findingId)
    expect(await ids('?list=wrong')).toEqual([findingId])
    expect(await ids('?list=right')).toEqual([])
    expect(await ids('?list=not-judged')).not.toContain(findingId)
    expect(await ids('?rule=mark-sudden')).toEqual([findingId])
    expect(await ids(`?unit=${home.propertyId}`)).toEqual([])
  })

  it('cannot be rewritten, not even by the program itself', async () => {
    await expect(open.db.updateTable('findingHindsight').set({ outcome: 'right' }).execute()).rejects.toThrow(/append-only/)
    await expect(open.db.deleteFrom('findingHindsight').execute()).rejects.toThrow(/append-only/)
  })

  it('is for staff: others are refused, each in their own way, and unsound sayings too', async () => {
    const path = `/api/findings/${findingId}/hindsight`
    await expectGuarded(home, { method: 'post', path, body: { outcome: 'right', reason: 'So' } })
    await expectGuarded(home, { method: 'get', path })
    const engineer = await bringEngineer(open.db, open.server.url, home)
    expect((await engineer.get(path)).status).toBe(200)
    expect((await engineer.post(path, { outcome: 'right', reason: 'So' })).status).toBe(403)
    await expectUnsound(home.as.owner, { method: 'post', path, body: { outcome: 'maybe', reason: 'So' } }, 'outcome')
    await expectUnsound(home.as.owner, { method: 'post', path, body: { outcome: 'right', reason: '  ' } }, 'reason')
    expect((await home.as.nobody.get('/api/ledger')).status).toBe(401)
    expect((await home.as.tenant.get('/api/ledger')).status).toBe(403)
    expect((await ledger('', home.as.stranger)).rows).toEqual([])
    for (const query of ['?list=some', '?rule=none', '?after=spoilt']) expect((await home.as.owner.get(`/api/ledger${query}`)).status).toBe(422)
  })
})

describe('the limits of the movement rules', () => {
  const read = async () => (await home.as.owner.get<LimitsView>('/api/limits')).body

  it('are ours until an owner changes them; a mark is then judged by them', async () => {
    const { limits, version } = await read()
    expect(limits).toEqual(OUR_LIMITS)
    const saved = await home.as.owner.put<LimitsView>('/api/limits', { ...limits, leastJumpMm: 1.5, jumpSigmas: 5, version })
    expect([saved.status, saved.body.limits.leastJumpMm, saved.body.version]).toEqual([200, 1.5, version + 1])
    expect(await open.db.selectFrom('organisation').select(['leastJumpMm', 'jumpSigmas', 'seasonAllowanceMm']).where('id', '=', home.organisationId).executeTakeFirstOrThrow())
      .toEqual({ leastJumpMm: 1.5, jumpSigmas: 5, seasonAllowanceMm: 1.5 })
    const entry = await open.db.selectFrom('recordEntry').select(['action', 'before', 'after']).where('subjectId', '=', home.organisationId).orderBy('seq', 'desc').executeTakeFirstOrThrow()
    expect(entry).toEqual({ action: 'limits changed', before: { leastJumpMm: 1, jumpSigmas: 4 }, after: { leastJumpMm: 1.5, jumpSigmas: 5 } })
    await open.db.transaction().execute(trx => judgeMark(trx, { userId: null, name: 'Test' }, markId))
    expect((await open.db.selectFrom('finding').select('clearedAt').where('id', '=', findingId).executeTakeFirstOrThrow()).clearedAt).not.toBeNull()
  })

  it('can be tried on the past, which says what of the ledger they would have kept or lost, and changes nothing', async () => {
    const { version } = await read()
    const { status, body } = await home.as.manager.post<LimitsRehearsalAnswer>('/api/limits/rehearsal', OUR_LIMITS)
    expect(status).toBe(200)
    expect(body).toMatchObject({ marks: 1, marksLeftOut: 0, alarmsNow: 0, alarmsThen: 1, judged: { rightKept: 0, rightLost: 0, wrongKept: 1, wrongSpared: 0 } })
    expect(body.changes).toMatchObject([{ markId, rule: 'mark-sudden', change: 'new', nowOn: null, findingId, outcome: 'wrong', markLabel: 'Crack by the door' }])
    expect((await read()).version).toBe(version)
  })

  it('refuse a stale version, values out of bounds, and people who may not', async () => {
    const { limits, version } = await read()
    const stale = await home.as.owner.put<Refusal>('/api/limits', { ...limits, version: version + 3 })
    expect([stale.status, stale.body.data.code]).toEqual([409, 'changed-meanwhile'])
    await expectUnsound(home.as.owner, { method: 'put', path: '/api/limits', body: { ...limits, pRising: 0.5, version } }, 'pRising')
    await expectUnsound(home.as.owner, { method: 'put', path: '/api/limits', body: { ...limits, leastReadings: 6.5, version } }, 'leastReadings')
    await expectUnsound(home.as.owner, { method: 'post', path: '/api/limits/rehearsal', body: { ...limits, jumpSigmas: 0 } }, 'jumpSigmas')
    for (const path of ['/api/limits', '/api/limits/rehearsal']) {
      const call = (client: OpenHome['as']['owner']) => path.endsWith('rehearsal') ? client.post(path, limits) : client.put(path, { ...limits, version })
      expect([(await call(home.as.nobody)).status, (await call(home.as.tenant)).status]).toEqual([401, 403])
    }
    expect((await home.as.manager.put('/api/limits', { ...limits, version })).status).toBe(403)
    expect([(await home.as.nobody.get('/api/limits')).status, (await home.as.tenant.get('/api/limits')).status]).toEqual([401, 403])
  })
})
