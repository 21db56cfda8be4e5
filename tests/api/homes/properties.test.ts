import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { things } from '../../../server/db/queries/things'
import { newId } from '../../../server/utils/newId'
import { nowInstant } from '../../../server/utils/clock'
import type { Page, PropertyCard, PropertyFacts, PropertyPage, UnitCard } from '../../../shared/types/home'
import { openServer, type OpenHome, type OpenServer, type Refusal } from '../review/openHome'
import { bringEngineer, entryAbout, expectGuarded, expectUnsound } from './guarded'

let open: OpenServer
let home: OpenHome

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
})
afterAll(() => open.close())

const list = async (query = '') => (await home.as.owner.get<Page<PropertyCard>>(`/api/properties${query}`)).body
const row = async (id: string) => (await things.property(open.db, id))!
interface Made { id: string, unitId: string | null, atticId: string | null }
const make = async (input: object) => (await home.as.owner.post<Made>('/api/properties', input)).body

describe('POST /api/properties', () => {
  it('keeps a property by its name alone, on the organisation\'s own chain', async () => {
    const { id, unitId } = await make({ name: '  12 Wren Close  ' })
    expect(unitId).toBeNull()
    expect(await row(id)).toMatchObject({ name: '12 Wren Close', addressLines: [], yearBuilt: null, organisationId: home.organisationId, version: 1 })
    expect(await entryAbout(open.db, id)).toMatchObject({ action: 'property added', unitId: null, chainId: home.organisationId })
  })

  it('makes property, unit, rooms and attic in one go', async () => {
    const made = await make({
      name: 'One go', addressLines: ['1 Made Up Road', ' ', 'Examplebury'], yearBuilt: 1931, notes: 'Invented.',
      firstUnit: { name: 'Whole house', rooms: [{ name: 'Bedroom', isBedroom: true }, { name: 'Kitchen', ceilingFinish: 'plaster-on-lath', lengthFt: 11.5 }], atticName: 'Attic' },
    })
    expect((await row(made.id)).addressLines).toEqual(['1 Made Up Road', 'Examplebury'])
    const rooms = await open.db.selectFrom('room').select(['name', 'isBedroom', 'ceilingFinish', 'lengthFt', 'sort']).where('unitId', '=', made.unitId!).orderBy('sort').execute()
    expect(rooms).toEqual([
      { name: 'Bedroom', isBedroom: true, ceilingFinish: 'unknown', lengthFt: null, sort: 0 },
      { name: 'Kitchen', isBedroom: false, ceilingFinish: 'plaster-on-lath', lengthFt: 11.5, sort: 1 },
    ])
    expect(await things.attic(open.db, made.atticId!)).toMatchObject({ name: 'Attic', unitId: made.unitId })
    const status = await open.db.selectFrom('unitStatus').selectAll().where('unitId', '=', made.unitId!).executeTakeFirstOrThrow()
    expect(status).toMatchObject({ propertyId: made.id, atticCount: 1, loadState: 'unsurveyed', openFindings: 0 })
    const actions = await open.db.selectFrom('recordEntry').select('action').where('chainId', '=', made.unitId!).orderBy('seq').execute()
    expect(actions.map(entry => entry.action)).toEqual(['unit added', 'room added', 'room added', 'attic added'])
  })

  it('keeps nothing at all when one part is unsound', async () => {
    const before = await open.db.selectFrom('property').select(eb => eb.fn.countAll<number>().as('n')).executeTakeFirstOrThrow()
    await expectUnsound(home.as.owner, { method: 'post', path: '/api/properties', body: { name: 'Half', firstUnit: { name: 'Flat', rooms: [{ name: '' }] } } }, 'firstUnit.rooms.0.name')
    expect(await open.db.selectFrom('property').select(eb => eb.fn.countAll<number>().as('n')).executeTakeFirstOrThrow()).toEqual(before)
  })

  it.each([
    [{ name: ' ' }, 'name'], [{}, 'name'], [{ name: 'x'.repeat(161) }, 'name'], [{ name: 'A', yearBuilt: 54 }, 'yearBuilt'], [{ name: 'A', yearBuilt: 1954.5 }, 'yearBuilt'],
    [{ name: 'A', addressLines: Array.from({ length: 9 }, String) }, 'addressLines'], [{ name: 'A', notes: 'n'.repeat(5001) }, 'notes'], [{ name: 'A', owner: 'me' }, 'form'], [{ name: 7 }, 'name'],
  ])('refuses %o at its field', (body, field) => expectUnsound(home.as.owner, { method: 'post', path: '/api/properties', body }, field))

  it('is for those who manage homes', async () => {
    expect((await home.as.nobody.post<Refusal>('/api/properties', { name: 'A' })).status).toBe(401)
    for (const client of [home.as.tenant, home.as.trades]) expect((await client.post<Refusal>('/api/properties', { name: 'A' })).status).toBe(403)
    expect((await home.as.manager.post('/api/properties', { name: 'By the manager' })).status).toBe(200)
  })
})

describe('GET /api/properties', () => {
  it('counts units, findings and weight, and shows the unit that most needs a look first', async () => {
    const made = await make({ name: 'Counted', firstUnit: { name: 'A quiet one' } })
    const worse = (await home.as.owner.post<{ id: string }>(`/api/properties/${made.id}/units`, { name: 'B in trouble', rooms: [{ name: 'Hall' }] })).body.id
    await open.db.updateTable('unitStatus').set({ worstSeverity: 'urgent', openFindings: 3, storedLb: 640, activeMarks: 1, loadState: 'over' }).where('unitId', '=', worse).execute()
    const [found] = (await list('?search=counted')).rows
    expect(found).toMatchObject({ unitCount: 2, openFindings: 3, urgentFindings: 1, activeMarks: 1, storedLb: 640, overUnits: 1 })
    expect(found!.units.map(unit => unit.name)).toEqual(['B in trouble', 'A quiet one'])
    expect(found!.units[0]!.section!.rooms.map(room => room.name)).toEqual(['Hall'])
  })

  it('finds by name, address, unit and tenant, with signs of a pattern taken as themselves', async () => {
    await make({ name: 'Needle House', addressLines: ['77 Haystack Way'], firstUnit: { name: 'Thimble flat' } })
    for (const search of ['needle', 'haystack', 'thimble']) expect((await list(`?search=${search}`)).rows.map(found => found.name), search).toEqual(['Needle House'])
    expect((await list('?search=Tess')).rows.map(found => found.name)).toEqual(['4 Alder Row'])
    for (const search of ['%25', '_', '%5C']) expect((await list(`?search=${search}`)).rows, search).toEqual([])
  })

  it('pages through all without losing or repeating any', async () => {
    const other = await open.openHome()
    const names = Array.from({ length: 44 }, (_, n) => `House ${n % 3}`)
    await open.db.insertInto('property').values(names.map(name => ({ id: newId(), organisationId: other.organisationId, name, createdAt: nowInstant() }))).execute()
    const seen: string[] = []
    let after: string | null = ''
    while (after !== null) {
      const page: Page<PropertyCard> = (await other.as.owner.get<Page<PropertyCard>>(`/api/properties?after=${after}`)).body
      expect(page.rows.length).toBeLessThanOrEqual(20)
      seen.push(...page.rows.map(found => found.id))
      after = page.next
    }
    expect([seen.length, new Set(seen).size]).toEqual([45, 45])
  })

  it('refuses a place in the list that is not one of its own', async () => {
    for (const after of ['nonsense', Buffer.from('[1,2]').toString('base64url'), Buffer.from('["a","not an id"]').toString('base64url'), Buffer.from('{"a":1}').toString('base64url')]) {
      await expectUnsound(home.as.owner, { method: 'get', path: `/api/properties?after=${after}` }, 'after')
    }
  })

  it('shows nothing of another organisation, and is not for tenants or trades', async () => {
    expect((await home.as.stranger.get<Page<PropertyCard>>('/api/properties?search=needle')).body.rows).toEqual([])
    expect((await home.as.nobody.get('/api/properties')).status).toBe(401)
    for (const client of [home.as.tenant, home.as.trades]) expect((await client.get('/api/properties')).status).toBe(403)
  })
})

describe('one property', () => {
  const path = () => `/api/properties/${home.propertyId}`
  const facts = { name: '4 Alder Row', addressLines: ['4 Alder Row'], yearBuilt: 1962, notes: '' }

  it('is answered with its units and what the asker may do', async () => {
    const { body } = await home.as.manager.get<PropertyPage>(path())
    expect(body.property).toMatchObject({ name: '4 Alder Row', yearBuilt: 1962 })
    expect(body.units.rows.map(unit => [unit.name, unit.tenantName, unit.propertyName])).toEqual([['Upstairs', 'Tess', '4 Alder Row']])
    expect(body.abilities).toContain('edit homes')
    expect(body.abilities).not.toContain('manage organisation')
    expect(Object.keys(body.property)).not.toContain('organisationId')
  })

  it('is guarded, read and write', async () => {
    await expectGuarded(home, { method: 'get', path: path() }, 'not theirs')
    await expectGuarded(home, { method: 'patch', path: path(), body: { ...facts, version: 1 } }, 'not theirs')
    await expectGuarded(home, { method: 'post', path: `${path()}/units`, body: { name: 'X' } }, 'not theirs')
    for (const act of ['archive', 'restore']) await expectGuarded(home, { method: 'post', path: `${path()}/${act}`, body: { version: 1 } }, 'not theirs')
    expect((await home.as.owner.get('/api/properties/not-an-id')).status).toBe(404)
    expect((await home.as.owner.get(`/api/properties/${newId()}`)).status).toBe(404)
  })

  it('changes only what changed, and records before and after', async () => {
    const { status, body } = await home.as.owner.patch<PropertyFacts>(path(), { ...facts, yearBuilt: 1958, version: 1 })
    expect([status, body.yearBuilt, body.version]).toEqual([200, 1958, 2])
    expect(await entryAbout(open.db, home.propertyId)).toMatchObject({ action: 'property changed', before: { addressLines: [], yearBuilt: 1962 }, after: { addressLines: ['4 Alder Row'], yearBuilt: 1958 } })
    expect((await home.as.owner.patch<PropertyFacts>(path(), { ...facts, yearBuilt: 1958, version: 2 })).body.version).toBe(2)
  })

  it('answers a stale edit with the version that stands, and keeps that', async () => {
    const { status, body } = await home.as.manager.patch<{ data: { code: string, theirs: PropertyFacts } }>(path(), { ...facts, name: 'Mine', version: 1 })
    expect([status, body.data.code, body.data.theirs.yearBuilt]).toEqual([409, 'changed-meanwhile', 1958])
    expect((await row(home.propertyId)).name).toBe('4 Alder Row')
  })

  it('refuses unsound edits at their field', async () => {
    await expectUnsound(home.as.owner, { method: 'patch', path: path(), body: { ...facts, name: '', version: 2 } }, 'name')
    await expectUnsound(home.as.owner, { method: 'patch', path: path(), body: { name: 'Without the rest', version: 2 } }, 'notes')
    await expectUnsound(home.as.owner, { method: 'patch', path: path(), body: facts }, 'version')
    await expectUnsound(home.as.owner, { method: 'post', path: `${path()}/archive`, body: {} }, 'version')
    await expectUnsound(home.as.owner, { method: 'post', path: `${path()}/units`, body: { name: '' } }, 'name')
  })
})

describe('archiving a property', () => {
  it('is refused while somebody lives there', async () => {
    const { status, body } = await home.as.owner.post<Refusal>(`/api/properties/${home.propertyId}/archive`, { version: 2 })
    expect([status, body.data.code]).toEqual([409, 'still-let'])
    expect(body.message).toContain('Tess')
    expect((await row(home.propertyId)).archivedAt).toBeNull()
  })

  it('takes its units along, and restoring brings back those and no others', async () => {
    const made = await make({ name: 'Put away', firstUnit: { name: 'In use' } })
    const before = (await home.as.owner.post<{ id: string }>(`/api/properties/${made.id}/units`, { name: 'Archived before' })).body.id
    expect((await home.as.owner.post(`/api/units/${before}/archive`, { version: 1 })).status).toBe(200)
    expect((await home.as.owner.post(`/api/properties/${made.id}/archive`, { version: 1 })).status).toBe(200)
    expect((await list('?search=put away')).rows).toEqual([])
    expect((await list('?archived=yes')).rows.map(found => found.name)).toContain('Put away')
    expect((await things.unit(open.db, made.unitId!))!.archivedAt).toBe((await row(made.id)).archivedAt)
    const refused = await home.as.owner.post<Refusal>(`/api/units/${made.unitId}/restore`, { version: 2 })
    expect([refused.status, refused.body.data.code]).toEqual([409, 'archived'])
    const full = await home.as.owner.post<Refusal>(`/api/properties/${made.id}/units`, { name: 'New' })
    expect([full.status, full.body.data.code]).toEqual([409, 'archived'])
    expect((await home.as.owner.post(`/api/properties/${made.id}/restore`, { version: 2 })).status).toBe(200)
    expect((await things.unit(open.db, made.unitId!))!.archivedAt).toBeNull()
    expect((await things.unit(open.db, before))!.archivedAt).not.toBeNull()
    expect(await entryAbout(open.db, made.unitId!)).toMatchObject({ action: 'unit restored' })
  })
})

describe('GET /api/units', () => {
  it('gives staff all units by property and name, others only theirs', async () => {
    const engineer = await bringEngineer(open.db, open.server.url, home)
    const units = async (client = home.as.owner, query = '') => (await client.get<Page<UnitCard>>(`/api/units${query}`)).body.rows
    expect((await units()).length).toBeGreaterThan(3)
    expect((await units(home.as.owner, '?search=alder')).map(unit => [unit.name, unit.tenantName, unit.section])).toEqual([['Upstairs', 'Tess', null]])
    const [seen, ...more] = await units(engineer, '?sections=yes')
    expect(more).toEqual([])
    expect([seen!.id, seen!.tenantName, seen!.section!.rooms[0]!.name]).toEqual([home.unitId, null, 'Bedroom'])
    expect((await units(home.as.tenant)).map(unit => [unit.id, unit.status])).toEqual([[home.unitId, null]])
    expect(await units(home.as.otherTenant)).toEqual([])
  })

  it('pages, and refuses people signed out and roles without it', async () => {
    const other = await open.openHome()
    await open.db.insertInto('unit').values(Array.from({ length: 40 }, (_, n) => ({ id: newId(), organisationId: other.organisationId, propertyId: other.propertyId, name: `Flat ${n % 2}`, createdAt: nowInstant() }))).execute()
    const first = (await other.as.owner.get<Page<UnitCard>>('/api/units')).body
    const second = (await other.as.owner.get<Page<UnitCard>>(`/api/units?after=${first.next}`)).body
    expect([first.rows.length, second.rows.length, second.next]).toEqual([30, 11, null])
    expect(new Set([...first.rows, ...second.rows].map(unit => unit.id)).size).toBe(41)
    await expectUnsound(home.as.owner, { method: 'get', path: '/api/units?after=x' }, 'after')
    expect((await home.as.nobody.get('/api/units')).status).toBe(401)
    expect((await home.as.trades.get('/api/units')).status).toBe(403)
  })
})
