import { defineEventHandler } from 'h3'
import pg from 'pg'

const pool = new pg.Pool({ connectionString: process.env.DATABASE_URL, max: Number(process.env.DATABASE_POOL ?? 10) })

/** One select by primary key through a pool as large as the program's. */
export default defineEventHandler(async () => {
  const { rows } = await pool.query<{ id: string, name: string }>('select id, name from organisation where id = $1', [process.env.REFERENCE_ORGANISATION_ID])
  return rows[0]
})
