import { sql, type Expression, type RawBuilder } from 'kysely'

/** Rows of a subquery as one JSON list, so that a page with many parts is one statement. */
export const jsonList = <T>(row: Expression<T>, orderBy: RawBuilder<unknown>): RawBuilder<T[]> =>
  sql<T[]>`coalesce(json_agg(${row} order by ${orderBy}), '[]'::json)`

/** An instant inside JSON as connect.ts gives it elsewhere: ISO with milliseconds and Z. */
export const isoInstant = <T extends string | null>(instant: Expression<T>): RawBuilder<T> =>
  sql<T>`to_char(${instant} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`
