import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { verifyChain } from '../../../server/db/commands/appendRecord'
import { newId } from '../../../server/utils/newId'
import type { UnloadTrialRow, UnloadTrialView } from '../../../shared/types/unloadTrial'
import { bringEngineer, expectGuarded, expectUnsound } from '../homes/guarded'
import { addItem, addMark, addReading, addSurvey, today } from '../review/inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from '../review/openHome'

let open: OpenServer
let home: OpenHome
let books: string
let tiles: string
let mark: string

beforeAll(async () => { open = await openServer() })
afterAll(() => open.close())

async function furnish() {
  home = await open.openHome()
  await addSurvey(open.db, home)
  books = await addItem(open.db, home, 300)
  tiles = await addItem(open.db, home, 500)
  mark = await addMark(open.db, home, { createdDaysAgo: 100 })
  for (const daysAgo of [90, 76, 62, 48]) await addReading(open.db, home, mark, daysAgo, 3 - daysAgo * 0.03)
}

const plan = (more: object = {}) => ({ purpose: ' Does the crack stop? ', plannedOn: today(3), itemIds: [books, tiles], markIds: [mark], ...more })
const path = () => `/api/attics/${home.atticId}/unload-trials`
const planned = async () => (await home.as.manager.post<UnloadTrialView>(path(), plan())).body
const nextReadingOn = async () => (await open.db.selectFrom('mark').select('nextReadingOn').where('id', '=', mark).executeTakeFirstOrThrow()).nextReadingOn
const unload = (trial: UnloadTrialView, more: object = {}) => home.as.owner.post<UnloadTrialView>(`/api/unload-trials/${trial.id}/unloading`, { unloadedOn: today(), itemIds: [books, tiles], version: trial.version, ...more })

describe('planning an unload trial', () => {
  it('keeps what is taken out, when, and which marks are watched, in rows and record', async () => {
    await furnish()
    const { status, body } = await home.as.manager.post<UnloadTrialView>(path(), plan())
    expect(status).toBe(200)
    expect(body).toMatchObject({
      state: 'planned', purpose: 'Does the crack stop?', plannedOn: today(3), unloadedOn: null, weightLb: 800, markCount: 1, createdByName: 'Milo', atticName: 'Loft', unloadNow: false,
      items: [{ weightLb: 300, removedOn: null }, { weightLb: 500 }], marks: [{ id: mark, roomName: 'Bedroom', result: { kind: 'cannot tell yet', readingsBefore: 4, missingBefore: 0, missingAfter: 3, moreReadings: 3 } }],
    })
    expect(await open.db.selectFrom('unloadTrial').selectAll().where('id', '=', body.id).executeTakeFirstOrThrow()).toMatchObject({ atticId: home.atticId, unitId: home.unitId, state: 'planned', version: 1 })
    expect(await open.db.selectFrom('recordEntry').select('action').where('subjectId', '=', body.id).execute()).toEqual([{ action: 'unload trial planned' }])
    // Read every two weeks while it is watched.
    expect(await nextReadingOn()).toBe(today(-48 + 14))
    const list = (await home.as.owner.get<{ rows: UnloadTrialRow[] }>(`/api/unload-trials?attic=${home.atticId}`)).body
    expect(list.rows).toMatchObject([{ id: body.id, weightLb: 800, markCount: 1 }])
    expect((await home.as.owner.get<{ rows: UnloadTrialRow[] }>('/api/unload-trials?state=ended')).body.rows).toEqual([])
  })

  it('refuses a second one in the same attic, a day that is past, and things or marks from elsewhere', async () => {
    const other = { item: books, mark }
    const second = await home.as.owner.post<Refusal>(path(), plan())
    expect([second.status, second.body.data.code]).toEqual([409, 'trial-runs'])
    await furnish()
    const unsound = (more: object, field: string) => expectUnsound(home.as.owner, { method: 'post', path: path(), body: plan(more) }, field)
    await unsound({ plannedOn: today(-1) }, 'plannedOn')
    await unsound({ itemIds: [other.item] }, 'itemIds')
    await unsound({ markIds: [other.mark] }, 'markIds')
    await unsound({ itemIds: [] }, 'itemIds')
    await unsound({ markIds: [mark, mark] }, 'markIds')
    await unsound({ purpose: ' ' }, 'purpose')
  })

  it('can be changed until it is carried out, with both choices in the record', async () => {
    const trial = await planned()
    const change = (more: object) => home.as.owner.put<UnloadTrialView & Refusal>(`/api/unload-trials/${trial.id}`, { ...plan(), version: trial.version, ...more })
    const { body } = await change({ itemIds: [tiles], plannedOn: today(5) })
    expect(body).toMatchObject({ plannedOn: today(5), weightLb: 500, version: 3 })
    expect((await change({})).body.data.code).toBe('changed-meanwhile')
    const entries = await open.db.selectFrom('recordEntry').select('after').where('subjectId', '=', trial.id).where('action', '=', 'unload trial changed').orderBy('seq').execute()
    expect(entries.map(entry => entry.after)).toEqual([{ plannedOn: today(5) }, { itemIds: [tiles], markIds: [mark] }])
  })

  it('says that unloading comes before measuring when the attic is over its rating', async () => {
    await furnish()
    await addItem(open.db, home, 5500)
    await home.as.owner.post(`/api/attics/${home.atticId}/inventory-confirmation`, { confirmedOn: today() })
    expect((await planned()).unloadNow).toBe(true)
  })
})

describe('carrying it out', () => {
  it('takes the things out with their load steps, judges the attic, and leaves out what stayed', async () => {
    await furnish()
    const { status, body } = await unload(await planned(), { itemIds: [tiles] })
    expect(status).toBe(200)
    expect(body).toMatchObject({ state: 'unloaded', unloadedOn: today(), weightLb: 500, unloadNow: false, items: [{ id: tiles, removedOn: today() }] })
    expect(await open.db.selectFrom('atticItem').select('removedOn').where('id', '=', books).executeTakeFirstOrThrow()).toEqual({ removedOn: null })
    expect(await open.db.selectFrom('loadEvent').select(['kind', 'deltaLb', 'happenedOn']).where('atticId', '=', home.atticId).execute()).toEqual([{ kind: 'out', deltaLb: -500, happenedOn: today() }])
    expect(await open.db.selectFrom('atticStatus').select('storedLb').where('atticId', '=', home.atticId).executeTakeFirstOrThrow()).toEqual({ storedLb: 300 })
    expect(await verifyChain(open.db, home.unitId)).toMatchObject({ kind: 'unbroken' })
  })

  it('gives the result in numbers once both sides have readings', async () => {
    await furnish()
    const trial = await planned()
    await expectUnsound(home.as.owner, { method: 'post', path: `/api/unload-trials/${trial.id}/unloading`, body: { unloadedOn: today(-40), itemIds: [books], version: trial.version } }, 'unloadedOn')
    await open.db.updateTable('atticItem').set({ placedOn: today(-200) }).where('atticId', '=', home.atticId).execute()
    const { body } = await unload(trial, { unloadedOn: today(-40) })
    expect(body.marks[0]!.result).toMatchObject({ kind: 'cannot tell yet', readingsAfter: 0, missingAfter: 3 })
    for (const daysAgo of [34, 20, 6]) await addReading(open.db, home, mark, daysAgo, 1.8)
    const { body: later } = await home.as.owner.get<UnloadTrialView>(`/api/unload-trials/${trial.id}`)
    expect(later.marks[0]!.result).toMatchObject({ kind: 'measured', readingsBefore: 4, readingsAfter: 3, slopeBefore: { value: expect.closeTo(0.03 * 365.25, 3) }, seasonFitted: false })
  })

  it('follows a watched mark to the one it was joined to', async () => {
    await furnish()
    const trial = await planned()
    const other = await addMark(open.db, home, { createdDaysAgo: 100 })
    await open.db.updateTable('reading').set({ markId: other }).where('markId', '=', mark).execute()
    await open.db.updateTable('mark').set({ state: 'closed', joinedInto: other }).where('id', '=', mark).execute()
    const { body } = await home.as.owner.get<UnloadTrialView>(`/api/unload-trials/${trial.id}`)
    expect(body.marks).toMatchObject([{ id: other, result: { readingsBefore: 4 } }])
  })

  it('refuses a day to come, things of no trial, a second time, and a stale version, and then leaves everything as it was', async () => {
    await furnish()
    const trial = await planned()
    expect((await unload(trial, { unloadedOn: today(1) })).status).toBe(422)
    expect((await unload(trial, { itemIds: [newId()] })).status).toBe(422)
    expect((await unload(trial, { version: 9 })).status).toBe(409)
    expect(await open.db.selectFrom('atticItem').select('id').where('atticId', '=', home.atticId).where('removedOn', 'is not', null).execute()).toEqual([])
    const { body } = await unload(trial)
    const again = await home.as.owner.post<Refusal>(`/api/unload-trials/${trial.id}/unloading`, { unloadedOn: today(), itemIds: [books], version: body.version })
    expect([again.status, again.body.data.code]).toEqual([409, 'state-does-not-allow'])
  })
})

describe('ending it', () => {
  const end = (trial: UnloadTrialView, more: object = {}) => home.as.owner.post<UnloadTrialView & Refusal>(`/api/unload-trials/${trial.id}/ending`, { endedOn: today(), conclusion: 'It stopped', version: trial.version, ...more })

  it('keeps the conclusion, and makes room for another trial', async () => {
    await furnish()
    const { body: unloaded } = await unload(await planned())
    expect((await end(unloaded, { endedOn: today(-1) })).status).toBe(422)
    expect((await end(unloaded)).body).toMatchObject({ state: 'ended', endedOn: today(), conclusion: 'It stopped' })
    expect((await end(unloaded)).status).toBe(409)
    await addItem(open.db, home, 100)
    const left = (await open.db.selectFrom('atticItem').select('id').where('atticId', '=', home.atticId).where('removedOn', 'is', null).executeTakeFirstOrThrow()).id
    expect((await home.as.owner.post(path(), plan({ itemIds: [left] }))).status).toBe(200)
  })

  it('before the unloading gives it up', async () => {
    await furnish()
    expect((await end(await planned(), { conclusion: '' })).body).toMatchObject({ state: 'given-up', unloadedOn: null })
    expect(await nextReadingOn()).toBe(today(-48 + 30))
  })
})

describe('who may', () => {
  it('staff run it, the people of the home and its engineer see it, nobody else learns of it', async () => {
    await furnish()
    await expectGuarded(home, { method: 'post', path: path(), body: plan() })
    const trial = await planned()
    const own = `/api/unload-trials/${trial.id}`
    await expectGuarded(home, { method: 'get', path: own }, 'allowed')
    await expectGuarded(home, { method: 'put', path: own, body: { ...plan(), version: 1 } })
    await expectGuarded(home, { method: 'post', path: `${own}/unloading`, body: { unloadedOn: today(), itemIds: [books], version: 1 } })
    await expectGuarded(home, { method: 'post', path: `${own}/ending`, body: { endedOn: today(), version: 1 } })
    await expectUnsound(home.as.owner, { method: 'put', path: own, body: { ...plan(), version: 'x' } }, 'version')
    await expectUnsound(home.as.owner, { method: 'post', path: `${own}/ending`, body: { endedOn: 'soon', version: 1 } }, 'endedOn')
    const engineer = await bringEngineer(open.db, open.server.url, home)
    for (const client of [home.as.tenant, engineer]) {
      expect((await client.get<UnloadTrialView>(own)).body).toMatchObject({ id: trial.id })
      expect((await client.get<{ rows: UnloadTrialRow[] }>('/api/unload-trials')).body.rows.map(row => row.id)).toEqual([trial.id])
    }
    expect((await home.as.otherTenant.get<{ rows: UnloadTrialRow[] }>('/api/unload-trials')).body.rows).toEqual([])
    expect((await home.as.nobody.get('/api/unload-trials')).status).toBe(401)
    expect((await home.as.trades.get('/api/unload-trials')).status).toBe(403)
    expect((await home.as.owner.get('/api/unload-trials?state=none')).status).toBe(422)
  })
})
