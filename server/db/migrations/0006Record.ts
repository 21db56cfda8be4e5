import { sql, type Kysely } from 'kysely'

/**
 * The record: append-only and hash-chained per unit (or per organisation for what belongs to no unit).
 * Two locks: the application's own role is granted no update or delete, and a trigger refuses both to everybody.
 */
export async function up(db: Kysely<unknown>) {
  await sql`create table record_chain (
    chain_id uuid primary key,
    organisation_id uuid not null references organisation,
    unit_id uuid,
    entries integer not null default 0,
    head_hash char(64) not null
  )`.execute(db)
  await sql`create index record_chain_of on record_chain (organisation_id)`.execute(db)
  await sql`create table record_entry (
    id uuid primary key,
    organisation_id uuid not null references organisation,
    unit_id uuid,
    chain_id uuid not null,
    seq integer not null check (seq >= 1),
    recorded_at timestamptz not null,
    actor_id uuid,
    actor_name text not null,
    action text not null,
    subject_kind text not null,
    subject_id uuid not null,
    before jsonb,
    after jsonb,
    previous_hash char(64) not null,
    hash char(64) not null,
    unique (chain_id, seq)
  )`.execute(db)
  await sql`create index record_entry_subject on record_entry (subject_id, seq)`.execute(db)
  await sql`create index record_entry_recent on record_entry (organisation_id, recorded_at desc, id desc)`.execute(db)
  await sql`create table record_checkpoint (
    id uuid primary key,
    organisation_id uuid not null references organisation,
    made_on date not null,
    chains integer not null,
    entries integer not null,
    hash char(64) not null,
    created_at timestamptz not null,
    unique (organisation_id, made_on)
  )`.execute(db)
  await sql`create function refuse_change() returns trigger language plpgsql as $$
    begin raise exception '% is append-only', tg_table_name using errcode = 'insufficient_privilege'; end $$`.execute(db)
  for (const table of ['record_entry', 'record_checkpoint', 'load_event', 'finding_event']) {
    await sql`create trigger append_only before update or delete on ${sql.table(table)} for each row execute function refuse_change()`.execute(db)
    await sql`create trigger append_only_truncate before truncate on ${sql.table(table)} for each statement execute function refuse_change()`.execute(db)
  }
  await grantToApplication(db)
}

/** The role exists when `npm start` made the cluster; elsewhere (DATABASE_URL set by hand) the triggers stand alone. */
async function grantToApplication(db: Kysely<unknown>) {
  await sql`do $$ begin
    if exists (select from pg_roles where rolname = 'lathkey_app') then
      grant usage on schema public to lathkey_app;
      grant select, insert, update, delete on all tables in schema public to lathkey_app;
      revoke update, delete on record_entry, record_checkpoint, load_event, finding_event from lathkey_app;
      alter default privileges in schema public grant select, insert, update, delete on tables to lathkey_app;
    end if;
  end $$`.execute(db)
}
