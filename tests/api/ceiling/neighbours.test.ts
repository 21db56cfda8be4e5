import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { nowInstant } from '../../../server/utils/clock'
import { newId } from '../../../server/utils/newId'
import type { NeighbourView } from '../../../shared/types/neighbours'
import { addDays } from '../../../shared/utils/days'
import { plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
import { startServer, type TestServer } from '../../support/server'

let server: TestServer
let home: CeilingHome
let own: string
let nextDoor: string

async function plantMark(unitId: string, roomId: string, number: number, perMonth: number, kind: 'crack' | 'sag' = 'crack') {
  const markId = newId()
  const { organisationId, db, tenantId, today } = home
  const at = nowInstant()
  await db.insertInto('mark').values({ id: markId, organisationId, unitId, roomId, atticId: home.atticId, number, kind, label: `Mark ${number}`, pinX: 0.5, pinY: 0.5, firstSeenOn: addDays(today, -300), createdBy: tenantId, createdAt: at }).execute()
  await db.insertInto('reading').values(Array.from({ length: 8 }, (_, i) => ({
    id: newId(), organisationId, unitId, markId, segment: 1, takenOn: addDays(today, (i - 8) * 30), value: 2 + i * perMonth, quantity: 'width_mm' as const, sigma: 0.1,
    method: 'calipers' as const, detail: '{}', takenBy: tenantId, clientKey: newId(), receivedAt: at,
  }))).execute()
  return markId
}

beforeAll(async () => {
  server = await startServer()
  home = await plantCeilingHome(server)
  own = await plantMark(home.unitId, home.bedroomId, 9001, 0.4)
  await plantMark(home.unitId, home.bedroomId, 9002, 0.4)
  await plantMark(home.unitId, home.hallId, 9003, 0.3)
  nextDoor = await plantMark(home.otherUnitId, home.otherRoomId, 9004, 0)
  await plantMark(home.otherUnitId, home.otherRoomId, 9005, 0.4, 'sag')
})
afterAll(async () => {
  await home?.close()
  await server?.stop()
})

describe('GET /api/marks/[markId]/neighbours', () => {
  it('compares marks of the same kind on the other ceilings of the house in the same months', async () => {
    const { status, body } = await home.owner.get<NeighbourView>(`/api/marks/${own}/neighbours`)
    expect(status).toBe(200)
    expect(body.neighbours.map(({ number, movement, roomName, unitName, underSameAttic }) => [number, movement, roomName, unitName, underSameAttic])).toEqual([
      [9003, 'same-way', 'Hall', 'Flat 1', true], [9004, 'still', 'Kitchen', 'Flat 2', true],
    ])
    expect(body).toMatchObject({ verdict: 'moves-with-others', fromOn: addDays(home.today, -240), untilOn: addDays(home.today, -30), own: { slopePerYear: expect.closeTo(0.4 * 365.25 / 30, 6) } })
    expect(body.months.length).toBeGreaterThan(4)
  })

  it('shows people of one home only what is theirs, and is a 404, 403 or 401 for others', async () => {
    expect((await home.tenant.get<NeighbourView>(`/api/marks/${own}/neighbours`)).body.neighbours.map(row => row.number)).toEqual([9003])
    expect((await home.engineer.get<NeighbourView>(`/api/marks/${own}/neighbours`)).body.neighbours.map(row => row.number)).toEqual([9003])
    expect((await home.tenant.get(`/api/marks/${nextDoor}/neighbours`)).status).toBe(404)
    expect((await home.stranger.get(`/api/marks/${own}/neighbours`)).status).toBe(404)
    expect((await home.owner.get('/api/marks/none/neighbours')).status).toBe(404)
    expect((await home.nobody.get(`/api/marks/${own}/neighbours`)).status).toBe(401)
  })
})
