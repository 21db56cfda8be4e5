import { sql } from 'kysely'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { compiledOnce } from '../../server/db/compiledOnce'
import { connect, type Connection } from '../../server/db/connect'
import { MOST_PREPARED } from '../../server/db/preparedPool'
import { nowInstant } from '../../server/utils/clock'
import { newId } from '../../server/utils/newId'
import { cloneDatabase, type TestDatabase } from '../support/database'

let database: TestDatabase
let connection: Connection
beforeAll(async () => {
  database = await cloneDatabase()
  // One connection, so that what it keeps can be looked at.
  connection = connect(database.ownerUrl, { max: 1 })
})
afterAll(async () => {
  await connection.close()
  await database.drop()
})

const preparedTexts = async () => {
  const { rows } = await connection.pool.query<{ statement: string }>('select statement from pg_prepared_statements')
  return rows.map(row => row.statement)
}

test('a statement asked twice is prepared once, and each asking gets its own answer', async () => {
  const ask = (n: number) => connection.db.selectNoFrom(sql<number>`${n}::int * 2`.as('doubled')).executeTakeFirstOrThrow()
  expect([await ask(3), await ask(4)]).toEqual([{ doubled: 6 }, { doubled: 8 }])
  expect((await preparedTexts()).filter(text => text.includes('::int * 2'))).toHaveLength(1)
})

test('begin, commit and the definition of tables are not prepared', async () => {
  await connection.db.transaction().execute(trx => sql`create temporary table passing (n int)`.execute(trx))
  expect((await preparedTexts()).some(text => /begin|commit|create/i.test(text))).toBe(false)
})

test('a table that changes under a running program costs no request', async () => {
  const ask = () => sql<{ n: number, m?: number }>`select * from passing`.execute(connection.db)
  await sql`insert into passing values (1)`.execute(connection.db)
  expect((await ask()).rows).toEqual([{ n: 1 }])
  await sql`alter table passing add column m int default 2`.execute(connection.db)
  expect((await ask()).rows).toEqual([{ n: 1, m: 2 }])
  expect((await ask()).rows).toEqual([{ n: 1, m: 2 }])
})

test('a statement that fails keeps the connection usable, and can be asked again', async () => {
  const divide = (by: number) => sql<{ share: number }>`select 6 / ${by}::int share`.execute(connection.db)
  await expect(divide(0)).rejects.toMatchObject({ code: '22012' })
  expect((await divide(2)).rows).toEqual([{ share: 3 }])
})

test('beyond the limit statements run without being prepared', async () => {
  for (let n = 0; n < MOST_PREPARED; n += 1) await sql`select ${sql.lit(n)} as number_${sql.raw(String(n))}`.execute(connection.db)
  const { rows } = await sql<{ last: string }>`select 'beyond' as last`.execute(connection.db)
  const texts = await preparedTexts()
  expect(rows).toEqual([{ last: 'beyond' }])
  expect(texts.some(text => text.includes('number_0'))).toBe(true)
  expect(texts.some(text => text.includes('beyond'))).toBe(false)
})

const insertOrganisation = async (name: string) =>
  connection.db.insertInto('organisation').values({ id: newId(), name, timeZone: 'UTC', createdAt: nowInstant() }).returning(['id', 'name', 'timeZone']).executeTakeFirstOrThrow()

test('a statement built once takes new values, nulls and lists each time', async () => {
  const [first, second] = [await insertOrganisation('Plumbline Homes'), await insertOrganisation('Quiet Rafter Homes')]
  let built = 0
  const named = compiledOnce((db, given: { ids: string[], zone: string, note: string | null }) => {
    built += 1
    return db.selectFrom('organisation').select(['name', 'timeZone', sql<string | null>`${given.note}::text`.as('note')])
      .where(sql<boolean>`id = any(${given.ids}::uuid[])`).where('timeZone', '=', given.zone).orderBy('name')
  })
  expect(await named.rows(connection.db, { ids: [first.id, second.id], zone: 'UTC', note: null }))
    .toEqual([{ name: 'Plumbline Homes', timeZone: 'UTC', note: null }, { name: 'Quiet Rafter Homes', timeZone: 'UTC', note: null }])
  expect(await named.first(connection.db, { ids: [second.id], zone: 'UTC', note: 'seen' })).toEqual({ name: 'Quiet Rafter Homes', timeZone: 'UTC', note: 'seen' })
  expect(await named.first(connection.db, { ids: [], zone: 'UTC', note: null })).toBeUndefined()
  expect(built).toBe(1)
})

test('each shape is built once', async () => {
  let built = 0
  const listed = compiledOnce((db, given: { zone: string }, shape: { withZone: boolean }) => {
    built += 1
    return db.selectFrom('organisation').select('name').$if(shape.withZone, query => query.select('timeZone')).where('timeZone', '=', given.zone).orderBy('name').limit(1)
  })
  for (const withZone of [true, false, true, false]) {
    expect(await listed.first(connection.db, { zone: 'UTC' }, { withZone })).toEqual(withZone ? { name: 'Plumbline Homes', timeZone: 'UTC' } : { name: 'Plumbline Homes' })
  }
  expect(built).toBe(2)
})

test('a value that is worked on while building fails at the first use', async () => {
  const wrong = compiledOnce((db, given: { name: string }) => db.selectFrom('organisation').select('id').where('name', '=', given.name.trim()))
  await expect(wrong.rows(connection.db, { name: ' x ' })).rejects.toThrow(TypeError)
})
