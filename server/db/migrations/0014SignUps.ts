import { sql, type Kysely } from 'kysely'

/** Who asked to begin, until the mailed link is followed; no account is made before. */
export async function up(db: Kysely<unknown>) {
  await sql`create table sign_up (
    id uuid primary key,
    email text not null check (email = lower(email)),
    name text not null,
    organisation_name text not null,
    time_zone text,
    token_hash text not null unique,
    expires_at timestamptz not null,
    used_at timestamptz,
    created_at timestamptz not null
  )`.execute(db)
  await sql`create index sign_up_expired on sign_up (expires_at)`.execute(db)
}
