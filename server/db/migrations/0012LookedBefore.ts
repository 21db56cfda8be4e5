import { sql, type Kysely } from 'kysely'

/** When somebody looked the time before, so that "since you last looked" stays the same during one visit. */
export async function up(db: Kysely<unknown>) {
  await sql`alter table membership add column looked_before_at timestamptz`.execute(db)
}
