import { execFile } from 'node:child_process'
import { mkdtemp, readFile, rm } from 'node:fs/promises'
import { join, resolve } from 'node:path'
import { promisify } from 'node:util'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { verifyChain } from '../../server/db/commands/appendRecord'
import { connect, type Connection } from '../../server/db/connect'
import { isPasswordOf } from '../../server/utils/passwords'
import { cloneDatabase, type TestDatabase } from '../support/database'

const run = promisify(execFile)
const root = resolve(import.meta.dirname, '../..')

describe('the invented demo', () => {
  let database: TestDatabase
  let connection: Connection
  let folder: string
  const plant = (...parameters: string[]) => run(process.execPath, ['--import', 'tsx', 'scripts/seed.ts', ...parameters], {
    cwd: root, env: { ...process.env, DATABASE_URL: database.appUrl, DATA_DIR: folder, PHOTO_DIR: join(folder, 'photos') },
  })

  beforeAll(async () => {
    database = await cloneDatabase()
    connection = connect(database.appUrl)
    folder = await mkdtemp(join(inject('testServices').folder, 'demo-'))
    await plant('--if-empty')
  }, 120_000)
  afterAll(async () => {
    await connection.close()
    await database.drop()
    await rm(folder, { recursive: true, force: true })
  })

  const count = async (table: 'property' | 'unit' | 'attic' | 'mark' | 'job' | 'photo') =>
    Number((await connection.db.selectFrom(table).select(eb => eb.fn.countAll<number>().as('n')).executeTakeFirstOrThrow()).n)

  it('has 6 properties, 14 units, 10 attics and 25 marks, with jobs and drawn photos', async () => {
    expect([await count('property'), await count('unit'), await count('attic'), await count('mark')]).toEqual([6, 14, 10, 25])
    expect(await count('job')).toBeGreaterThanOrEqual(5)
    expect(await count('photo')).toBeGreaterThan(60)
  })

  it('shows attics and marks in every state', async () => {
    const loads = await connection.db.selectFrom('atticStatus').select('loadState').distinct().execute()
    expect(loads.map(row => row.loadState).sort()).toEqual(['hold', 'near', 'over', 'unsurveyed', 'within'])
    const marks = await connection.db.selectFrom('mark').select('activity').distinct().execute()
    expect(marks.map(row => row.activity).sort()).toEqual(['active', 'dormant', 'too-few-readings', 'watch'])
    const kinds = await connection.db.selectFrom('mark').select('kind').distinct().execute()
    expect(kinds).toHaveLength(4)
  })

  it('shows an unload trial to come and one carried out, and findings judged right and wrong', async () => {
    expect((await connection.db.selectFrom('unloadTrial').select('state').orderBy('createdAt').execute()).map(row => row.state)).toEqual(['unloaded', 'planned'])
    expect((await connection.db.selectFrom('findingHindsight').select('outcome').distinct().orderBy('outcome').execute()).map(row => row.outcome)).toEqual(['right', 'wrong'])
  })

  it('uses no address outside .example, and everybody signs in with the printed password', async () => {
    const people = await connection.db.selectFrom('appUser').select(['email', 'passwordHash']).execute()
    expect(people.length).toBeGreaterThanOrEqual(9)
    for (const { email } of people) expect(email).toMatch(/\.example$/)
    const printed = JSON.parse(await readFile(join(folder, 'demo-sign-ins.json'), 'utf8')) as { email: string, password: string }[]
    expect(printed.map(row => row.email).sort()).toEqual(people.map(row => row.email).sort())
    expect(await isPasswordOf(people[0]!.passwordHash, printed[0]!.password)).toBe(true)
  })

  it('leaves every chain of the record unbroken', async () => {
    const chains = await connection.db.selectFrom('recordChain').select('chainId').execute()
    expect(chains.length).toBeGreaterThanOrEqual(14)
    for (const { chainId } of chains) expect(await verifyChain(connection.db, chainId)).toMatchObject({ kind: 'unbroken' })
  })

  it('tells a year in order: readings lie in the past and none after today', async () => {
    const { first, last } = await connection.db.selectFrom('reading').select(eb => [eb.fn.min('receivedAt').as('first'), eb.fn.max('receivedAt').as('last')]).executeTakeFirstOrThrow()
    expect(Date.parse(last) - Date.parse(first)).toBeGreaterThan(300 * 86_400_000)
    expect(Date.parse(last)).toBeLessThan(Date.now() + 86_400_000)
  })

  it('is planted once: a second start leaves it alone, and a filled database is refused without asking', async () => {
    await plant('--if-empty')
    expect(await count('mark')).toBe(25)
    await expect(plant()).rejects.toThrow(/not empty/)
  })
})
