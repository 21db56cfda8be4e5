import type { KyselyPlugin } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { verifyChain } from '../../../server/db/commands/appendRecord'
import { judgeAttic } from '../../../server/db/commands/judgeAttic'
import { judgeMark } from '../../../server/db/commands/judgeMark'
import { judgeUnit } from '../../../server/db/commands/judgeUnit'
import { reviewUnits } from '../../../server/db/commands/reviewUnits'
import type { Db } from '../../../server/db/connect'
import { fillHomesForReview } from '../../../bench/reviewHomes'
import { openDatabase } from './inventHome'

/** A small portfolio of the kind the bench is measured on. */
const COUNTS = { units: 9, marksEach: 4, readingsEach: 14, itemsEach: 5 }
const actor = { userId: null, name: 'Test' }

let opened: Awaited<ReturnType<typeof openDatabase>>
let organisationId: string
let unitIds: string[]

beforeAll(async () => {
  opened = await openDatabase()
  organisationId = await fillHomesForReview(opened.db, COUNTS)
  unitIds = (await opened.db.selectFrom('unit').select('id').orderBy('id').execute()).map(unit => unit.id)
})
afterAll(() => opened.drop())

const findings = () => opened.db.selectFrom('finding').selectAll().orderBy('id').execute()
const summaries = () => opened.db.selectFrom('unitStatus').selectAll().orderBy('unitId').execute()
const marks = () => opened.db.selectFrom('mark').selectAll().orderBy('id').execute()
const everything = async () => [await findings(), await summaries(), await marks(), await opened.db.selectFrom('dueItem').selectAll().orderBy('id').execute(), await opened.db.selectFrom('recordChain').selectAll().orderBy('chainId').execute()]

/** The same connection pool, counting what is asked through it. */
function counted(db: Db): { db: Db, count: () => number } {
  let statements = 0
  const plugin: KyselyPlugin = {
    transformQuery: ({ node }) => {
      statements += 1
      return node
    },
    transformResult: async ({ result }) => result,
  }
  return { db: db.withPlugin(plugin), count: () => statements }
}

describe('reviewing many units at once', () => {
  it('finds what judging each thing by itself would find', async () => {
    const counts = await reviewUnits(opened.db, organisationId, unitIds)
    expect(counts).toMatchObject({ attics: 9, marks: 36, written: 9 })
    const found = await findings()
    expect(new Set(found.map(finding => finding.rule)).size).toBeGreaterThanOrEqual(3)
    expect(found.some(finding => finding.rule === 'mark-active')).toBe(true)
    const before = await everything()
    const attics = await opened.db.selectFrom('attic').select('id').execute()
    await opened.db.transaction().execute(async (trx) => {
      for (const { id } of attics) await judgeAttic(trx, actor, id)
      for (const { id } of await marks()) await judgeMark(trx, actor, id)
      for (const id of unitIds) await judgeUnit(trx, actor, id)
    })
    expect(await everything()).toEqual(before)
  })

  it('keeps event and record of each finding, and every chain unbroken', async () => {
    const found = await findings()
    const events = await opened.db.selectFrom('findingEvent').select(['findingId', 'kind']).execute()
    expect(events.map(event => event.findingId).sort()).toEqual(found.map(finding => finding.id).sort())
    for (const unitId of unitIds) {
      const entries = found.filter(finding => finding.unitId === unitId).length
      expect(await verifyChain(opened.db, unitId)).toEqual({ kind: 'unbroken', entries })
    }
  })

  it('writes nothing at all when nothing changed', async () => {
    const written = () => opened.db.selectFrom('organisationChange').select(eb => eb.fn.sum<string>('changes').as('n')).executeTakeFirstOrThrow()
    const before = [await everything(), await written()]
    expect(await reviewUnits(opened.db, organisationId, unitIds)).toMatchObject({ marks: 36, written: 0 })
    expect([await everything(), await written()]).toEqual(before)
  })

  it('writes only the unit where something changed', async () => {
    const item = await opened.db.selectFrom('atticItem').selectAll().where('unitId', '=', unitIds[4]!).executeTakeFirstOrThrow()
    await opened.db.updateTable('atticItem').set({ typicalLb: 4000, highLb: 4000 }).where('id', '=', item.id).execute()
    expect(await reviewUnits(opened.db, organisationId, unitIds)).toMatchObject({ written: 1 })
    expect((await summaries()).find(row => row.unitId === unitIds[4])).toMatchObject({ loadState: 'over', worstSeverity: 'urgent' })
    expect(await opened.db.selectFrom('message').select('kind').execute()).toEqual([{ kind: 'urgent-finding' }])
    expect(await reviewUnits(opened.db, organisationId, unitIds)).toMatchObject({ written: 0 })
  })

  it('mends a summary that does not add up, and leaves marks somebody is editing to them', async () => {
    await opened.db.updateTable('unitStatus').set({ openMarks: 99 }).where('unitId', '=', unitIds[0]!).execute()
    const [first] = (await marks()).filter(mark => mark.unitId === unitIds[0])
    await opened.db.transaction().execute(async (editing) => {
      await editing.selectFrom('mark').select('id').where('id', '=', first!.id).forUpdate().execute()
      await opened.db.updateTable('reading').set({ value: 90 }).where('markId', '=', first!.id).execute()
      expect(await reviewUnits(opened.db, organisationId, unitIds)).toMatchObject({ written: 1 })
    })
    expect((await summaries()).find(row => row.unitId === unitIds[0])).toMatchObject({ openMarks: 4 })
    expect((await marks()).find(mark => mark.id === first!.id)).toMatchObject({ lastValue: first!.lastValue })
    await reviewUnits(opened.db, organisationId, unitIds)
    expect((await marks()).find(mark => mark.id === first!.id)).toMatchObject({ lastValue: 90 })
  })

  it('asks as many statements for nine units as for one', async () => {
    const one = counted(opened.db)
    await reviewUnits(one.db, organisationId, unitIds.slice(0, 1))
    const all = counted(opened.db)
    await reviewUnits(all.db, organisationId, unitIds)
    expect(all.count()).toBe(one.count())
    expect(all.count()).toBeLessThanOrEqual(20)
  })
})
