import { sql, type Kysely } from 'kysely'

/** An engineer's letter may say that the strongbacks share the load; only then do they count in a verdict. */
export async function up(db: Kysely<unknown>) {
  await sql`alter table attic_document add column accepts_strongbacks boolean not null default false`.execute(db)
}
