import { sql } from 'kysely'
import type { Db } from './connect'

const EVENTS = [['insert', 'new'], ['update', 'new'], ['delete', 'old']] as const

/** Tables whose rows say by themselves which organisation they belong to; the counter does not count itself. */
async function tablesOfOrganisations(db: Db): Promise<string[]> {
  const { rows } = await sql<{ name: string }>`
    select c.table_name as name from information_schema.columns c join information_schema.tables t using (table_schema, table_name)
    where c.table_schema = 'public' and c.column_name = 'organisation_id' and t.table_type = 'BASE TABLE' and c.table_name <> 'organisation_change'
    order by c.table_name`.execute(db)
  return rows.map(row => row.name)
}

async function follow(db: Db, table: string, procedure: string) {
  for (const [event, rows] of EVENTS) {
    await sql`create or replace trigger ${sql.id(`follow_${event}`)} after ${sql.raw(event)} on ${sql.table(table)}
      referencing ${sql.raw(rows)} table as changed_rows for each statement execute function ${sql.id(procedure)}()`.execute(db)
  }
}

/** After every migration: whatever table there is now, its changes are counted. Running it again changes nothing. */
export async function followChanges(db: Db): Promise<void> {
  await db.transaction().execute(async (trx) => {
    for (const table of await tablesOfOrganisations(trx)) await follow(trx, table, 'follow_rows')
    await follow(trx, 'organisation', 'follow_organisations')
    await follow(trx, 'app_user', 'follow_people')
  })
}
