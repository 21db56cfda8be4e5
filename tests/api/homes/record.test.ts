import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { appendRecord } from '../../../server/db/commands/appendRecord'
import { newId } from '../../../server/utils/newId'
import type { RecordPage } from '../../../shared/types/record'
import type { Client } from '../../support/client'
import { openServer, type OpenHome, type OpenServer } from '../review/openHome'
import { bringEngineer, expectGuarded, expectUnsound } from './guarded'

let open: OpenServer
let home: OpenHome
let engineer: Client

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
  engineer = await bringEngineer(open.db, open.server.url, home)
  await home.as.owner.post(`/api/units/${home.unitId}/rooms`, { name: 'Hall' })
  await home.as.owner.patch(`/api/units/${home.unitId}`, { name: 'Upstairs', notes: '', accessNotes: 'Key box 0000', version: 1 })
  await home.as.owner.post('/api/properties', { name: 'On the organisation’s chain' })
  for (let n = 0; n < 60; n += 1) {
    await open.db.transaction().execute(trx => appendRecord(trx, { userId: home.owner, name: 'Oona' }, {
      organisationId: home.organisationId, unitId: home.unitId, action: 'reading recorded', subjectKind: 'reading', subjectId: newId(), after: { value: n / 10 },
    }))
  }
})
afterAll(() => open.close())

const path = (query = '') => `/api/units/${home.unitId}/record${query}`
const read = async (query = '', client = home.as.owner) => (await client.get<RecordPage>(path(query))).body

describe('GET /api/units/[unitId]/record', () => {
  it('answers the newest entries first and says that the chain is unbroken', async () => {
    const page = await read()
    expect(page.chain).toEqual({ kind: 'unbroken', entries: 62 })
    expect(page.rows).toHaveLength(50)
    expect(page.rows[0]).toMatchObject({ seq: 62, action: 'reading recorded', actorName: 'Oona', after: { value: 5.9 }, before: null })
  })

  it('goes on to the first entry without losing or repeating any, and checks the chain once', async () => {
    const first = await read()
    const second = await read(`?after=${first.next}`)
    expect([second.rows.map(row => row.seq), second.next, second.chain]).toEqual([Array.from({ length: 12 }, (_, n) => 12 - n), null, null])
  })

  it('narrows to one kind of thing', async () => {
    expect((await read('?subject=room')).rows.map(row => row.action)).toEqual(['room added'])
    expect((await read('?subject=job')).rows).toEqual([])
  })

  it('is open to the engineer of the unit, without codes, names and costs', async () => {
    const [entry] = (await read('?subject=unit', engineer)).rows
    expect(entry).toMatchObject({ action: 'unit changed', after: { accessNotes: 'not shown to your role' } })
    expect((await read('?subject=unit')).rows[0]).toMatchObject({ after: { accessNotes: 'Key box 0000' } })
    expect(JSON.stringify((await read('', engineer)).rows)).not.toContain('0000')
  })

  it('is guarded and refuses unsound questions', async () => {
    await expectGuarded(home, { method: 'get', path: path() })
    await expectUnsound(home.as.owner, { method: 'get', path: path('?subject=gossip') }, 'subject')
    expect((await home.as.owner.get(path('?after=%00'))).status).toBe(422)
    await expectUnsound(home.as.owner, { method: 'get', path: path(`?after=${Buffer.from('["x"]').toString('base64url')}`) }, 'after')
  })
})

describe('GET /api/record', () => {
  it('is what belongs to no unit, for those who see the portfolio', async () => {
    const { rows, chain } = (await home.as.manager.get<RecordPage>('/api/record')).body
    expect(rows.map(row => row.action)).toEqual(['property added'])
    expect(chain).toEqual({ kind: 'unbroken', entries: 1 })
    expect((await home.as.nobody.get('/api/record')).status).toBe(401)
    for (const client of [home.as.tenant, home.as.trades, engineer]) expect((await client.get('/api/record')).status).toBe(403)
    expect((await home.as.stranger.get<RecordPage>('/api/record')).body.rows).toEqual([])
    await expectUnsound(home.as.owner, { method: 'get', path: '/api/record?after=x' }, 'after')
  })
})
