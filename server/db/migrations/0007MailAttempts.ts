import { sql, type Kysely } from 'kysely'

/** When a waiting mail may be tried (again): the back-off after a refusal, and the lease of whoever is sending it now. */
export async function up(db: Kysely<unknown>) {
  await sql`alter table message add column next_attempt_at timestamptz`.execute(db)
  await sql`update message set next_attempt_at = created_at`.execute(db)
  await sql`alter table message alter column next_attempt_at set not null`.execute(db)
  await sql`drop index message_waiting`.execute(db)
  await sql`create index message_waiting on message (next_attempt_at) where state = 'queued'`.execute(db)
}
