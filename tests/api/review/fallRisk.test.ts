import { afterAll, beforeAll, expect, it } from 'vitest'
import { judgeMark } from '../../../server/db/commands/judgeMark'
import { listMarks } from '../../../server/db/queries/marks'
import { fallRiskOfRoom } from '../../../server/db/queries/riskRank'
import { CEILING_FINISHES } from '../../../shared/types/attic'
import { fallRisk } from '../../../shared/utils/upkeep/fallRisk'
import { newId } from '../../../server/utils/newId'
import { nowInstant } from '../../../server/utils/clock'
import { addMark, addReading, inventHome, openDatabase, today } from './inventHome'

let opened: Awaited<ReturnType<typeof openDatabase>>
beforeAll(async () => { opened = await openDatabase() })
afterAll(() => opened.drop())

it('the database weighs a ceiling as the calculation does', async () => {
  const home = await inventHome(opened.db)
  for (const ceilingFinish of CEILING_FINISHES) {
    for (const [ceilingHeightIn, isBedroom] of [[null, true], [108, false], [84.5, true]] as const) {
      await opened.db.updateTable('room').set({ ceilingFinish, ceilingHeightIn, isBedroom }).where('id', '=', home.roomId).execute()
      const { score } = await opened.db.selectFrom('room as r').select(fallRiskOfRoom.as('score')).where('r.id', '=', home.roomId).executeTakeFirstOrThrow()
      expect(score).toBeCloseTo(fallRisk({ ceilingFinish, ceilingHeightIn, isBedroom }), 10)
    }
  }
})

it('of two marks equally grave the one over a bed stands first, in the list of marks and as the home’s top finding', async () => {
  const home = await inventHome(opened.db)
  const { organisationId, unitId } = home
  const hallId = newId()
  await opened.db.insertInto('room').values({ id: hallId, organisationId, unitId, name: 'Hall', ceilingFinish: 'plaster-on-lath', isBedroom: false, createdAt: nowInstant() }).execute()
  await opened.db.updateTable('room').set({ ceilingFinish: 'plaster-on-lath', isBedroom: true }).where('id', '=', home.roomId).execute()
  const inHall = await addMark(opened.db, { ...home, roomId: hallId })
  const overBed = await addMark(opened.db, home)
  for (const mark of [inHall, overBed]) {
    for (const [daysAgo, value] of [[30, 1], [0, 4]] as const) await addReading(opened.db, home, mark, daysAgo, value)
    await opened.db.transaction().execute(trx => judgeMark(trx, { userId: null, name: 'Test' }, mark))
  }
  const { topFindingId } = await opened.db.selectFrom('unitStatus').select('topFindingId').where('unitId', '=', unitId).executeTakeFirstOrThrow()
  expect(await opened.db.selectFrom('finding').select(['rule', 'subjectId']).where('id', '=', topFindingId).executeTakeFirstOrThrow()).toEqual({ rule: 'mark-sudden', subjectId: overBed })
  const { rows } = await listMarks(opened.db, { organisationId, units: 'all', today: today() }, { sort: 'risk', limit: 50 })
  expect(rows.map(row => row.id)).toEqual([overBed, inHall])
})
