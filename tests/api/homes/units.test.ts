import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { judgeAttic } from '../../../server/db/commands/judgeAttic'
import { things } from '../../../server/db/queries/things'
import type { UnitFacts, UnitPage } from '../../../shared/types/home'
import type { Client } from '../../support/client'
import { addItem, addMark, addSurvey, soundSurvey, today } from '../review/inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from '../review/openHome'
import { bringEngineer, entryAbout, expectGuarded, expectUnsound } from './guarded'

let open: OpenServer
let home: OpenHome
let engineer: Client

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
  engineer = await bringEngineer(open.db, open.server.url, home)
})
afterAll(() => open.close())

const path = (part = '') => `/api/units/${home.unitId}${part}`
const page = async (client = home.as.owner) => (await client.get<UnitPage>(path())).body
const row = async () => (await things.unit(open.db, home.unitId))!

describe('GET /api/units/[unitId]', () => {
  it('answers all a page needs: rooms, attics with contents, tenancies, marks, findings, jobs, status', async () => {
    await addSurvey(open.db, home, soundSurvey())
    await addItem(open.db, home, 5500)
    await addMark(open.db, home)
    await open.db.transaction().execute(trx => judgeAttic(trx, { userId: null, name: 'Test' }, home.atticId))
    const unit = await page()
    expect(unit.unit).toMatchObject({ id: home.unitId, name: 'Upstairs', propertyId: home.propertyId })
    expect(unit.property).toMatchObject({ name: '4 Alder Row', yearBuilt: 1962 })
    expect(unit.rooms.map(room => room.name)).toEqual(['Bedroom'])
    expect(unit.attics).toHaveLength(1)
    expect(unit.attics[0]).toMatchObject({ name: 'Loft', surveyedOn: today(-10), ratedPsf: 20, onHold: false, loadState: 'over', storedLb: 5500, fields: [{ spanFt: 12, spacingIn: 16, joistCount: 16 }] })
    expect(unit.attics[0]!.items.map(item => [item.name, item.typicalLb])).toEqual([['Invented boxes', 5500]])
    expect(unit.attics[0]!.survey).toMatchObject({ framing: 'rafters-and-joists' })
    expect(unit.attics[0]!.documents).toEqual([])
    expect(unit.tenancies.map(tenancy => [tenancy.tenantName, tenancy.people])).toEqual([['Tess', ['Tess']]])
    expect(unit.marks.map(mark => [mark.label, mark.roomId, mark.activity])).toEqual([['Crack by the door', home.roomId, 'too-few-readings']])
    expect(unit.findings.map(finding => finding.rule)).toContain('attic-load')
    expect(unit.findings.find(finding => finding.rule === 'attic-load')).toMatchObject({ subject: { kind: 'attic', id: home.atticId }, clearedAt: null, acknowledgedAt: null })
    expect(unit.findings[0]!.openedAt).toMatch(/^\d{4}-\d\d-\d\dT[\d:]+\.\d{3}Z$/)
    expect(unit.status).toMatchObject({ loadState: 'over', atticCount: 1 })
    expect(unit.today).toBe(today())
  })

  it('counts a line of several pieces as all of them', async () => {
    const other = await open.openHome()
    const id = await addItem(open.db, other, 40)
    await open.db.updateTable('atticItem').set({ quantity: 12 }).where('id', '=', id).execute()
    expect((await other.as.owner.get<UnitPage>(`/api/units/${other.unitId}`)).body.attics[0]!.storedLb).toBe(480)
  })

  it('lets a tenant see the home they live in, without what is the landlord\'s', async () => {
    await home.as.owner.patch(path(), { name: 'Upstairs', notes: 'Rent is late.', accessNotes: 'Key box 0000', version: (await row()).version })
    const seen = await page(home.as.tenant)
    expect([seen.unit.accessNotes, seen.unit.notes, seen.findings, seen.status]).toEqual([null, '', [], null])
    expect(seen.tenancies.map(tenancy => tenancy.tenantName)).toEqual(['Tess'])
    expect(seen.abilities).not.toContain('edit homes')
  })

  it('lets an engineer read the unit they were asked about, and change nothing', async () => {
    const seen = await page(engineer)
    expect(seen.findings.length).toBeGreaterThan(0)
    expect([seen.tenancies, seen.jobs, seen.unit.accessNotes]).toEqual([[], [], null])
    expect((await engineer.patch<Refusal>(path(), { name: 'x', notes: '', accessNotes: '', version: 1 })).status).toBe(403)
  })

  it('is guarded', async () => {
    await expectGuarded(home, { method: 'get', path: path() }, 'allowed')
    expect((await home.as.trades.get(path())).status).toBe(404)
    expect((await home.as.owner.get('/api/units/nothing')).status).toBe(404)
  })
})

describe('PATCH /api/units/[unitId]', () => {
  const facts = { name: 'Upstairs flat', notes: 'Quiet.', accessNotes: 'Ring twice.' }

  it('changes the unit and records it on the unit\'s own chain', async () => {
    const { version } = await row()
    const { body } = await home.as.manager.patch<UnitFacts>(path(), { ...facts, version })
    expect([body.name, body.version]).toEqual(['Upstairs flat', version + 1])
    expect(await row()).toMatchObject(facts)
    expect(await entryAbout(open.db, home.unitId)).toMatchObject({ action: 'unit changed', chainId: home.unitId, after: facts })
  })

  it('of two edits at once keeps the first and shows it to the second', async () => {
    const { version } = await row()
    const answers = await Promise.all(['One', 'Two'].map(name => home.as.owner.patch<{ data?: { theirs: UnitFacts } }>(path(), { ...facts, name, version })))
    expect(answers.map(answer => answer.status).sort()).toEqual([200, 409])
    const refused = answers.find(answer => answer.status === 409)!
    expect(refused.body.data!.theirs.name).toBe((await row()).name)
  })

  it('is guarded and refuses unsound input at its field', async () => {
    const { version } = await row()
    await expectGuarded(home, { method: 'patch', path: path(), body: { ...facts, version } })
    await expectUnsound(home.as.owner, { method: 'patch', path: path(), body: { ...facts, name: ' ', version } }, 'name')
    await expectUnsound(home.as.owner, { method: 'patch', path: path(), body: { ...facts, accessNotes: 'a'.repeat(2001), version } }, 'accessNotes')
    await expectUnsound(home.as.owner, { method: 'patch', path: path(), body: { ...facts, version: 'latest' } }, 'version')
  })
})

describe('archiving a unit', () => {
  it('is refused while somebody lives there, and goes through when the tenancy has ended', async () => {
    const { version } = await row()
    const refused = await home.as.owner.post<Refusal>(path('/archive'), { version })
    expect([refused.status, refused.body.data.code]).toEqual([409, 'still-let'])
    await open.db.updateTable('tenancy').set({ endsOn: today(-1) }).where('unitId', '=', home.unitId).execute()
    const archived = await home.as.owner.post<UnitFacts>(path('/archive'), { version })
    expect([archived.status, typeof archived.body.archivedAt]).toEqual([200, 'string'])
    for (const part of ['rooms', 'attics', 'tenancies']) {
      const { status, body } = await home.as.owner.post<Refusal>(path(`/${part}`), { name: 'New', ...(part === 'tenancies' ? { name: undefined, tenantName: 'New', startsOn: today() } : {}) })
      expect([status, body.data.code], part).toEqual([409, 'archived'])
    }
    const restored = await home.as.owner.post<UnitFacts>(path('/restore'), { version: archived.body.version })
    expect([restored.status, restored.body.archivedAt]).toEqual([200, null])
    const actions = await open.db.selectFrom('recordEntry').select('action').where('subjectId', '=', home.unitId).orderBy('seq', 'desc').limit(2).execute()
    expect(actions.map(entry => entry.action)).toEqual(['unit restored', 'unit archived'])
  })

  it('is guarded', async () => {
    const other = await open.openHome()
    for (const act of ['archive', 'restore']) {
      await expectGuarded(other, { method: 'post', path: `/api/units/${other.unitId}/${act}`, body: { version: 1 } })
      await expectUnsound(other.as.owner, { method: 'post', path: `/api/units/${other.unitId}/${act}`, body: { version: 0 } }, 'version')
    }
  })
})

describe('POST /api/units/[unitId]/attics', () => {
  it('adds an attic that waits for its survey, and the unit says so', async () => {
    const other = await open.openHome()
    const { status, body } = await other.as.owner.post<{ id: string }>(`/api/units/${other.unitId}/attics`, { name: 'Over the porch', notes: 'Low.' })
    expect(status).toBe(200)
    expect(await things.attic(open.db, body.id)).toMatchObject({ name: 'Over the porch', notes: 'Low.', unitId: other.unitId, archivedAt: null })
    expect(await entryAbout(open.db, body.id)).toMatchObject({ action: 'attic added', chainId: other.unitId })
    expect((await other.as.owner.get<UnitPage>(`/api/units/${other.unitId}`)).body.status).toMatchObject({ atticCount: 2, loadState: 'unsurveyed' })
    await expectGuarded(other, { method: 'post', path: `/api/units/${other.unitId}/attics`, body: { name: 'X' } })
    await expectUnsound(other.as.owner, { method: 'post', path: `/api/units/${other.unitId}/attics`, body: { name: '' } }, 'name')
  })
})
