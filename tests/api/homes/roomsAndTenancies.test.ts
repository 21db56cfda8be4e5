import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createTenancy } from '../../../server/db/commands/createTenancy'
import { things } from '../../../server/db/queries/things'
import { newId } from '../../../server/utils/newId'
import type { RoomFacts, TenancyFacts, UnitPage } from '../../../shared/types/home'
import { addMark, today } from '../review/inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from '../review/openHome'
import { entryAbout, expectGuarded, expectUnsound } from './guarded'

let open: OpenServer
let home: OpenHome

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
})
afterAll(() => open.close())

const room = { name: 'Parlour', isBedroom: false, lengthFt: 14.5, widthFt: 11.25, ceilingHeightIn: 96, ceilingFinish: 'gypsum-half-inch' }
const roomNames = async (owner = home) => (await owner.as.owner.get<UnitPage>(`/api/units/${owner.unitId}`)).body.rooms.map(({ name }) => name)

describe('rooms', () => {
  it('are added after the others, with size and finish', async () => {
    const { status, body } = await home.as.owner.post<{ id: string }>(`/api/units/${home.unitId}/rooms`, room)
    expect(status).toBe(200)
    expect(await things.room(open.db, body.id)).toMatchObject({ ...room, sort: 1, unitId: home.unitId })
    expect(await entryAbout(open.db, body.id)).toMatchObject({ action: 'room added', after: room })
    await home.as.owner.post(`/api/units/${home.unitId}/rooms`, { name: 'Hall' })
    expect(await roomNames()).toEqual(['Bedroom', 'Parlour', 'Hall'])
  })

  it('are put in another order as a whole, and only as a whole', async () => {
    const { rooms } = (await home.as.owner.get<UnitPage>(`/api/units/${home.unitId}`)).body
    const ids = rooms.map(({ id }) => id)
    const order = (roomIds: string[]) => home.as.owner.put<Refusal>(`/api/units/${home.unitId}/room-order`, { roomIds })
    expect((await order([ids[2]!, ids[0]!, ids[1]!])).status).toBe(200)
    expect(await roomNames()).toEqual(['Hall', 'Bedroom', 'Parlour'])
    expect(await entryAbout(open.db, home.unitId)).toMatchObject({ action: 'rooms put in another order', before: { rooms: ['Bedroom', 'Parlour', 'Hall'] } })
    for (const wrong of [ids.slice(0, 2), [...ids, ids[0]!], [ids[0]!, ids[0]!, ids[1]!], [ids[0]!, ids[1]!, newId()]]) expect((await order(wrong)).status).toBe(422)
    expect(await roomNames()).toEqual(['Hall', 'Bedroom', 'Parlour'])
    await expectGuarded(home, { method: 'put', path: `/api/units/${home.unitId}/room-order`, body: { roomIds: ids } })
  })

  it('are changed with the version that was seen', async () => {
    const change = { ...room, name: 'Front parlour', ceilingFinish: 'plaster-on-lath', ceilingHeightIn: null }
    const id = (await open.db.selectFrom('room').select('id').where('name', '=', 'Parlour').executeTakeFirstOrThrow()).id
    expect((await home.as.manager.patch<RoomFacts>(`/api/rooms/${id}`, { ...change, version: 1 })).body).toMatchObject({ name: 'Front parlour', ceilingFinish: 'plaster-on-lath', version: 2 })
    expect(await entryAbout(open.db, id)).toMatchObject({ before: { name: 'Parlour', ceilingHeightIn: 96 }, after: { name: 'Front parlour', ceilingHeightIn: null } })
    const stale = await home.as.owner.patch<{ data: { code: string, theirs: RoomFacts } }>(`/api/rooms/${id}`, { ...room, version: 1 })
    expect([stale.status, stale.body.data.code, stale.body.data.theirs.name]).toEqual([409, 'changed-meanwhile', 'Front parlour'])
    await expectGuarded(home, { method: 'patch', path: `/api/rooms/${id}`, body: { ...change, version: 2 } })
  })

  it.each([
    [{ name: '' }, 'name'], [{ name: 'A', lengthFt: 0 }, 'lengthFt'], [{ name: 'A', lengthFt: -3 }, 'lengthFt'], [{ name: 'A', widthFt: 201 }, 'widthFt'], [{ name: 'A', widthFt: '12' }, 'widthFt'],
    [{ name: 'A', ceilingHeightIn: 601 }, 'ceilingHeightIn'], [{ name: 'A', ceilingFinish: 'velvet' }, 'ceilingFinish'], [{ name: 'A', isBedroom: 'yes' }, 'isBedroom'], [{ name: 'A', sort: 3 }, 'form'],
  ])('refuse %o at its field', (body, field) => expectUnsound(home.as.owner, { method: 'post', path: `/api/units/${home.unitId}/rooms`, body }, field))

  it('are archived unless a mark on their ceiling is still followed, and come back', async () => {
    const other = await open.openHome()
    const markId = await addMark(open.db, other)
    const refused = await other.as.owner.post<Refusal>(`/api/rooms/${other.roomId}/archive`, { version: 1 })
    expect([refused.status, refused.body.data.code]).toEqual([409, 'room-has-marks'])
    await open.db.updateTable('mark').set({ state: 'closed' }).where('id', '=', markId).execute()
    expect((await other.as.owner.post<RoomFacts>(`/api/rooms/${other.roomId}/archive`, { version: 1 })).body.version).toBe(2)
    const { rooms, archivedRooms } = (await other.as.owner.get<UnitPage>(`/api/units/${other.unitId}`)).body
    expect([rooms, archivedRooms.map(({ name }) => name)]).toEqual([[], ['Bedroom']])
    expect((await other.as.owner.post(`/api/rooms/${other.roomId}/restore`, { version: 2 })).status).toBe(200)
    expect(await roomNames(other)).toEqual(['Bedroom'])
    for (const act of ['archive', 'restore']) {
      await expectGuarded(other, { method: 'post', path: `/api/rooms/${other.roomId}/${act}`, body: { version: 3 } })
      await expectUnsound(other.as.owner, { method: 'post', path: `/api/rooms/${other.roomId}/${act}`, body: {} }, 'version')
    }
  })
})

describe('tenancies', () => {
  const path = () => `/api/units/${home.unitId}/tenancies`
  const add = (input: object) => home.as.owner.post<{ id: string } & Refusal>(path(), { tenantName: 'Ada Renter', ...input })

  it('may follow one another, day after day', async () => {
    await open.db.updateTable('tenancy').set({ startsOn: '2025-01-01', endsOn: '2025-12-31' }).where('unitId', '=', home.unitId).execute()
    const { status, body } = await add({ startsOn: '2026-01-01', endsOn: '2026-06-30', notes: 'Two people.' })
    expect(status).toBe(200)
    expect(await things.tenancy(open.db, body.id)).toMatchObject({ tenantName: 'Ada Renter', startsOn: '2026-01-01', endsOn: '2026-06-30', notes: 'Two people.' })
    expect(await entryAbout(open.db, body.id)).toMatchObject({ action: 'tenancy added', chainId: home.unitId, after: { tenantName: 'Ada Renter', startsOn: '2026-01-01' } })
    expect((await add({ tenantName: 'Bo Renter', startsOn: '2026-07-01' })).status).toBe(200)
  })

  it.each([
    ['both days count', { startsOn: '2024-11-01', endsOn: '2025-01-01' }, 'Tess'], ['inside another', { startsOn: '2026-02-01', endsOn: '2026-02-02' }, 'Ada Renter'],
    ['around others', { startsOn: '2020-01-01' }, 'Tess'], ['after an open one', { startsOn: '2030-01-01' }, 'Bo Renter'],
  ])('are refused where they overlap: %s', async (_why, days, who) => {
    const { status, body } = await add(days)
    expect([status, body.data.code]).toEqual([409, 'overlaps'])
    expect(body.data.fields!.startsOn).toContain(who)
  })

  it('of two overlapping ones added at the same moment only one is kept', async () => {
    const other = await open.openHome()
    await open.db.deleteFrom('tenancyPerson').where('organisationId', '=', other.organisationId).execute()
    await open.db.deleteFrom('tenancy').where('unitId', '=', other.unitId).execute()
    const unit = (await things.unit(open.db, other.unitId))!
    const actor = { userId: other.owner, name: 'Oona', email: '', organisationId: other.organisationId, role: 'owner' as const, unitIds: [], timeZone: 'UTC' }
    const both = await Promise.allSettled(['A', 'B'].map(tenantName => createTenancy(open.db, actor, unit, { tenantName, startsOn: '2026-01-01', endsOn: null, notes: '' })))
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected'])
    expect(both.find(result => result.status === 'rejected')!.reason).toMatchObject({ statusCode: 409, data: { code: 'overlaps' } })
  })

  it('are changed with the version that was seen, and never into another', async () => {
    const { id } = await open.db.selectFrom('tenancy').select('id').where('tenantName', '=', 'Ada Renter').executeTakeFirstOrThrow()
    const facts = { tenantName: 'Ada Renter', startsOn: '2026-01-01', endsOn: '2026-06-29', notes: '' }
    expect((await home.as.owner.patch<TenancyFacts>(`/api/tenancies/${id}`, { ...facts, version: 1 })).body).toMatchObject({ endsOn: '2026-06-29', version: 2 })
    expect(await entryAbout(open.db, id)).toMatchObject({ action: 'tenancy changed', before: { endsOn: '2026-06-30' }, after: { endsOn: '2026-06-29' } })
    const into = await home.as.owner.patch<Refusal>(`/api/tenancies/${id}`, { ...facts, endsOn: '2026-07-01', version: 2 })
    expect([into.status, into.body.data.code]).toEqual([409, 'overlaps'])
    const stale = await home.as.owner.patch<Refusal>(`/api/tenancies/${id}`, { ...facts, version: 1 })
    expect([stale.status, stale.body.data.code]).toEqual([409, 'changed-meanwhile'])
    await expectUnsound(home.as.owner, { method: 'patch', path: `/api/tenancies/${id}`, body: { ...facts, endsOn: '2025-12-31', version: 2 } }, 'endsOn')
  })

  it.each([
    [{ startsOn: '2026-02-30' }, 'startsOn'], [{ startsOn: 'soon' }, 'startsOn'], [{}, 'startsOn'], [{ tenantName: '', startsOn: '2040-01-01' }, 'tenantName'], [{ startsOn: '2040-01-02', endsOn: '2040-01-01' }, 'endsOn'],
  ])('refuse %o at its field', (input, field) => expectUnsound(home.as.owner, { method: 'post', path: path(), body: { tenantName: 'Ada', ...input } }, field))

  it('are guarded', async () => {
    const other = await open.openHome()
    const { id } = await open.db.selectFrom('tenancy').select('id').where('unitId', '=', other.unitId).executeTakeFirstOrThrow()
    const facts = { tenantName: 'X', startsOn: today(), endsOn: null, notes: '' }
    await expectGuarded(other, { method: 'post', path: `/api/units/${other.unitId}/tenancies`, body: facts })
    await expectGuarded(other, { method: 'patch', path: `/api/tenancies/${id}`, body: { ...facts, version: 1 } })
  })
})
