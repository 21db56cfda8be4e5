import { sql } from 'kysely'
import { publicRoute } from '../utils/apiRoute'

export default publicRoute(async ({ db }) => {
  await sql`select 1`.execute(db)
  return { up: true, database: true }
})
