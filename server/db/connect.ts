import { CamelCasePlugin, Kysely, PostgresDialect, type Transaction } from 'kysely'
import pg from 'pg'
import { preparedPool } from './preparedPool'
import type { Database } from './schema'

const DATE = 1082
const TIMESTAMPTZ = 1184
const INT8 = 20

/** Days stay 'YYYY-MM-DD'; instants become ISO strings, as the browser will see them; counts become numbers. */
const types: pg.CustomTypesConfig = {
  getTypeParser(oid: number, format?: 'text' | 'binary') {
    if (format !== 'binary') {
      if (oid === DATE) return (text: string) => text
      if (oid === TIMESTAMPTZ) return (text: string) => new Date(text).toISOString()
      if (oid === INT8) return (text: string) => Number(text)
    }
    return pg.types.getTypeParser(oid, format as 'text')
  },
}

export type Db = Kysely<Database>
export type Trx = Transaction<Database>

export interface Connection { db: Db, pool: pg.Pool, close: () => Promise<void> }

/** One pool per process. A lost server shows as an error on the next query; pg reconnects by itself. */
export function connect(url: string, options: { max?: number } = {}): Connection {
  const pool = new pg.Pool({
    connectionString: url, types, max: options.max ?? 10,
    connectionTimeoutMillis: 5_000, idleTimeoutMillis: 30_000, keepAlive: true,
    application_name: 'lathkey',
  })
  pool.on('error', () => { /* an idle client lost its server; the pool has dropped it and the next query tells the caller */ })
  const db = new Kysely<Database>({
    dialect: new PostgresDialect({ pool: preparedPool(pool) }),
    plugins: [new CamelCasePlugin({ maintainNestedObjectKeys: true })],
  })
  return { db, pool, close: () => db.destroy() }
}
