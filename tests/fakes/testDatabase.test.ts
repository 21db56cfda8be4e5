import pg from 'pg'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { pendingMigrations } from '../../server/db/migrate'
import { cloneDatabase, type TestDatabase } from '../support/database'

let database: TestDatabase
beforeAll(async () => {
  database = await cloneDatabase()
})
afterAll(() => database.drop())

async function query(url: string, text: string) {
  const client = new pg.Client({ connectionString: url })
  client.on('error', () => undefined)
  await client.connect()
  try {
    return (await client.query(text)).rows as Record<string, unknown>[]
  }
  finally {
    await client.end()
  }
}

test('a cloned database has the newest schema and no organisation', async () => {
  expect(await pendingMigrations(database.ownerUrl)).toEqual([])
  expect(await query(database.appUrl, 'select count(*)::int as count from organisation')).toEqual([{ count: 0 }])
})

test('the application\'s role may write, but not rewrite the record', async () => {
  expect(await query(database.appUrl, `select has_table_privilege('organisation', 'insert') as organisation,
    has_table_privilege('record_entry', 'insert') as append, has_table_privilege('record_entry', 'update') as rewrite, has_table_privilege('record_entry', 'delete') as erase`))
    .toEqual([{ organisation: true, append: true, rewrite: false, erase: false }])
})

test('the application\'s role may make a schema of its own, and owns no table of ours', async () => {
  await query(database.appUrl, 'create schema queue')
  expect(await query(database.ownerUrl, 'select distinct tableowner from pg_tables where schemaname = \'public\'')).toEqual([{ tableowner: 'lathkey_owner' }])
})

test('two clones know nothing of each other', async () => {
  const other = await cloneDatabase()
  await query(database.ownerUrl, 'create table only_here (id int)')
  await expect(query(other.ownerUrl, 'select from only_here')).rejects.toThrow('does not exist')
  await other.drop()
  await expect(query(other.ownerUrl, 'select 1')).rejects.toThrow('does not exist')
})

test('a database can be made unreachable and reachable again', async () => {
  await database.setReachable(false)
  await expect(query(database.appUrl, 'select 1')).rejects.toThrow()
  await database.setReachable(true)
  expect(await query(database.appUrl, 'select 1 as one')).toEqual([{ one: 1 }])
})
