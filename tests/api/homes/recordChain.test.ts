import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { connect, type Connection, type Db } from '../../../server/db/connect'
import { appendRecord, verifyChain } from '../../../server/db/commands/appendRecord'
import { newId } from '../../../server/utils/newId'
import { FIRST_HASH } from '../../../server/utils/recordHash'
import { inventHome, openDatabase, type InventedHome } from '../review/inventHome'

let opened: Awaited<ReturnType<typeof openDatabase>>
let owner: Connection
let db: Db

beforeAll(async () => {
  opened = await openDatabase()
  db = opened.db
  owner = connect(opened.database.ownerUrl, { max: 2 })
})
afterAll(async () => {
  await owner.close()
  await opened.drop()
})

const actor = { userId: null, name: 'Oona' }
const append = (home: InventedHome, after: object, unitId: string | null = home.unitId) => db.transaction().execute(trx =>
  appendRecord(trx, actor, { organisationId: home.organisationId, unitId, action: 'note added', subjectKind: 'unit', subjectId: home.unitId, after }))

async function chainOf(entries: number): Promise<InventedHome> {
  const home = await inventHome(db)
  for (let n = 1; n <= entries; n += 1) await append(home, { n })
  return home
}

/** What only somebody with the owner's password can do: the trigger is put aside, then rows are changed. */
async function tamper(change: (db: Db) => Promise<unknown>) {
  await sql`alter table record_entry disable trigger append_only`.execute(owner.db)
  try { await change(owner.db) }
  finally { await sql`alter table record_entry enable trigger append_only`.execute(owner.db) }
}

describe('a chain', () => {
  it('starts from nothing, each entry following from the one before', async () => {
    const home = await chainOf(3)
    const rows = await db.selectFrom('recordEntry').select(['seq', 'previousHash', 'hash']).where('chainId', '=', home.unitId).orderBy('seq').execute()
    expect(rows.map(row => row.seq)).toEqual([1, 2, 3])
    expect(rows.map(row => row.previousHash)).toEqual([FIRST_HASH, rows[0]!.hash, rows[1]!.hash])
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'unbroken', entries: 3 })
    expect(await verifyChain(db, newId())).toEqual({ kind: 'unbroken', entries: 0 })
  })

  it('keeps what belongs to no unit on the organisation\'s own', async () => {
    const home = await chainOf(1)
    await append(home, { name: 'a property' }, null)
    expect(await verifyChain(db, home.organisationId)).toEqual({ kind: 'unbroken', entries: 1 })
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'unbroken', entries: 1 })
  })

  it('takes back its entry with the transaction it belongs to', async () => {
    const home = await chainOf(2)
    await expect(db.transaction().execute(async (trx) => {
      await appendRecord(trx, actor, { organisationId: home.organisationId, unitId: home.unitId, action: 'undone', subjectKind: 'unit', subjectId: home.unitId })
      throw new Error('the work failed')
    })).rejects.toThrow('the work failed')
    await append(home, { n: 3 })
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'unbroken', entries: 3 })
  })

  it('has one order when many write to one unit at once', async () => {
    const home = await chainOf(0)
    await Promise.all(Array.from({ length: 24 }, (_, n) => append(home, { n })))
    const rows = await db.selectFrom('recordEntry').select('seq').where('chainId', '=', home.unitId).orderBy('seq').execute()
    expect(rows.map(row => row.seq)).toEqual(Array.from({ length: 24 }, (_, n) => n + 1))
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'unbroken', entries: 24 })
  })

  it('lets writers of different units pass each other', async () => {
    const [one, two] = await Promise.all([chainOf(0), chainOf(0)])
    await db.transaction().execute(async (trx) => {
      await appendRecord(trx, actor, { organisationId: one.organisationId, unitId: one.unitId, action: 'held', subjectKind: 'unit', subjectId: one.unitId })
      await append(two, { passed: true })
    })
    expect(await verifyChain(db, two.unitId)).toEqual({ kind: 'unbroken', entries: 1 })
  })

  it('does not look broken to somebody who checks while others write', async () => {
    const home = await chainOf(1)
    const writing = (async () => {
      for (let n = 0; n < 60; n += 1) await append(home, { n })
    })()
    const verdicts = []
    for (let n = 0; n < 60; n += 1) verdicts.push(await verifyChain(db, home.unitId))
    await writing
    expect(verdicts.every(verdict => verdict.kind === 'unbroken'), JSON.stringify(verdicts.filter(verdict => verdict.kind === 'broken'))).toBe(true)
  })

  it('is read through when it is longer than one batch', async () => {
    const home = await chainOf(0)
    await db.transaction().execute(async (trx) => {
      for (let n = 0; n < 1003; n += 1) await appendRecord(trx, actor, { organisationId: home.organisationId, unitId: home.unitId, action: 'counted', subjectKind: 'unit', subjectId: home.unitId, after: { n } })
    })
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'unbroken', entries: 1003 })
  })

  it.each<[string, object]>([
    ['floats', { a: 0.1 + 0.2, b: 1e21, c: 1e-7, d: -0, e: 5e-324, f: Number.MAX_SAFE_INTEGER, g: 1.7976931348623157e308, h: 12345678.12345678 }],
    ['letters', { 'name': 'Łódź 🏚️ é e\u0301 \u2028 "quoted" \\ / \n\t\u0001', 'key with ü and 🪜': 'x' }],
    ['nesting', { z: [{ b: 1, a: [null, true, [], {}] }], a: { c: { b: { a: '' } } } }],
    ['what is not there', { missing: undefined, empty: null, list: [undefined] }],
    ['names in an awkward order', { 'b': 1, 'a': 2, 'B': 3, 'A': 4, '10': 5, '9': 6, 'aa': 7, 'ä': 8, '': 9 }],
    ['days and instants', { on: '2027-03-14', at: new Date('2027-03-14T14:08:00.120Z') }],
  ])('comes back from the database as it was hashed: %s', async (_what, after) => {
    const home = await chainOf(1)
    await append(home, after)
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'unbroken', entries: 2 })
  })
})

describe('a chain that somebody tampered with as the owner of the database', () => {
  it('names the entry whose content was changed', async () => {
    const home = await chainOf(5)
    await tamper(rows => rows.updateTable('recordEntry').set({ after: JSON.stringify({ n: 33 }) }).where('chainId', '=', home.unitId).where('seq', '=', 3).execute())
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'broken', seq: 3, why: 'its content does not match its hash' })
  })

  it.each([['actorName', 'Somebody else'], ['action', 'note removed'], ['recordedAt', '2020-01-01T00:00:00.000Z'], ['subjectKind', 'room']] as const)('notices a changed %s', async (column, value) => {
    const home = await chainOf(3)
    await tamper(rows => rows.updateTable('recordEntry').set({ [column]: value }).where('chainId', '=', home.unitId).where('seq', '=', 2).execute())
    expect(await verifyChain(db, home.unitId)).toMatchObject({ kind: 'broken', seq: 2 })
  })

  it('names the entry after one that was made to fit itself again', async () => {
    const home = await chainOf(4)
    const { hashEntry } = await import('../../../server/utils/recordHash')
    await tamper(async (rows) => {
      const entry = await rows.selectFrom('recordEntry').selectAll().where('chainId', '=', home.unitId).where('seq', '=', 2).executeTakeFirstOrThrow()
      const hash = hashEntry({ ...entry, after: { n: 99 } })
      await rows.updateTable('recordEntry').set({ after: JSON.stringify({ n: 99 }), hash }).where('id', '=', entry.id).execute()
    })
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'broken', seq: 3, why: 'it does not follow from the entry before' })
  })

  it('names the place of an entry that was taken out of the middle', async () => {
    const home = await chainOf(4)
    await tamper(rows => rows.deleteFrom('recordEntry').where('chainId', '=', home.unitId).where('seq', '=', 2).execute())
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'broken', seq: 2, why: 'an entry is missing' })
  })

  it('notices that the newest entries were cut off', async () => {
    const home = await chainOf(4)
    await tamper(rows => rows.deleteFrom('recordEntry').where('chainId', '=', home.unitId).where('seq', '>', 2).execute())
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'broken', seq: 3, why: 'the chain is longer than its entries' })
  })
})

describe('the application\'s own role', () => {
  const refusedOf = (work: Promise<unknown>) => work.then(() => 'allowed', (error: { code?: string }) => error.code)

  it('cannot change, delete or empty the record, nor put the trigger aside', async () => {
    const home = await chainOf(1)
    expect(await refusedOf(db.updateTable('recordEntry').set({ action: 'x' }).where('chainId', '=', home.unitId).execute())).toBe('42501')
    expect(await refusedOf(db.deleteFrom('recordEntry').where('chainId', '=', home.unitId).execute())).toBe('42501')
    expect(await refusedOf(sql`truncate record_entry`.execute(db))).toBe('42501')
    expect(await refusedOf(sql`alter table record_entry disable trigger append_only`.execute(db))).toBe('42501')
    expect(await refusedOf(sql`drop trigger append_only on record_entry`.execute(db))).toBe('42501')
    expect(await verifyChain(db, home.unitId)).toEqual({ kind: 'unbroken', entries: 1 })
  })

  it('is not the only one held: with the trigger in place the owner cannot change an entry either', async () => {
    const home = await chainOf(1)
    expect(await refusedOf(owner.db.updateTable('recordEntry').set({ action: 'x' }).where('chainId', '=', home.unitId).execute())).toBe('42501')
    expect(await refusedOf(owner.db.deleteFrom('recordEntry').where('chainId', '=', home.unitId).execute())).toBe('42501')
    expect(await refusedOf(sql`truncate record_entry`.execute(owner.db))).toBe('42501')
  })
})
