import { sql, type Kysely } from 'kysely'

/** How long an engineer may see the unit, and how often the invitation was mailed (each mail has a link of its own). */
export async function up(db: Kysely<unknown>) {
  await sql`alter table invitation add column until_on date, add column sends integer not null default 1 check (sends >= 1)`.execute(db)
  await sql`create index invitation_open on invitation (organisation_id, email) where accepted_at is null and revoked_at is null`.execute(db)
}
