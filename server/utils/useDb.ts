import { connect, type Connection, type Db } from '../db/connect'
import { problem } from './problems'

let connection: Connection | undefined

/** The process's one pool, opened at the first call. */
export function useConnection(): Connection {
  const url = process.env.DATABASE_URL
  if (!url) throw problem(503, 'database-away', 'No database is configured.', { retryAfterSeconds: 60 })
  return connection ??= connect(url, { max: Number(process.env.DATABASE_POOL ?? 10) })
}

export const useDb = (): Db => useConnection().db

export async function closeDb() {
  const closing = connection
  connection = undefined
  await closing?.close()
}
