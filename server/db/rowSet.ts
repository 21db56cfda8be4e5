import { sql, type RawBuilder } from 'kysely'
import type { Db } from './connect'
import type { Database } from './schema'

type ColumnType = 'uuid' | 'text' | 'date' | 'timestamptz' | 'integer' | 'boolean' | 'double precision' | 'jsonb'
export type ColumnTypes<R> = { [K in keyof R]-?: ColumnType }

const snake = (name: string) => name.replace(/[A-Z]/g, letter => `_${letter.toLowerCase()}`)

/**
 * Rows as a table `v` made of one parameter: a statement over many rows whose text stays the same however many there are,
 * so that it is prepared once. Columns come as snake_case.
 */
export function rowSet<R extends object>(rows: readonly R[], types: ColumnTypes<R>): RawBuilder<unknown> {
  const names = Object.keys(types) as (keyof R & string)[]
  const json = JSON.stringify(rows.map(row => Object.fromEntries(names.map(name => [snake(name), row[name]]))))
  const columns = sql.join(names.map(name => sql`${sql.raw(snake(name))} ${sql.raw(types[name])}`))
  return sql`jsonb_to_recordset(${json}::jsonb) as v(${columns})`
}

/** Inserts all of them in one statement; nothing for none. */
export async function insertRows<R extends object>(db: Db, table: keyof Database, rows: readonly R[], types: ColumnTypes<R>): Promise<void> {
  if (rows.length === 0) return
  const columns = sql.join(Object.keys(types).map(name => sql.raw(snake(name))))
  await sql`insert into ${sql.raw(snake(table))} (${columns}) select ${columns} from ${rowSet(rows, types)}`.execute(db)
}
