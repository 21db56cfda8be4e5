import { sql, type Kysely } from 'kysely'

/** Why something refused is kept all the same, lists that were read in, and the terms of storage people signed. */
export async function up(db: Kysely<unknown>) {
  await sql`alter table attic_item add column kept_despite text not null default ''`.execute(db)
  await sql`create table inventory_import (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    attic_id uuid not null,
    imported_by uuid not null references app_user,
    client_key uuid not null,
    items integer not null check (items >= 1),
    skipped integer not null check (skipped >= 0),
    imported_at timestamptz not null,
    unique (imported_by, client_key),
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id)
  )`.execute(db)
  await sql`create table terms_signature (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    attic_id uuid not null,
    user_id uuid not null references app_user,
    signed_name text not null check (length(signed_name) between 1 and 120),
    terms jsonb not null,
    signed_at timestamptz not null,
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id)
  )`.execute(db)
  await sql`create index terms_signature_of_attic on terms_signature (attic_id, signed_at desc, id desc)`.execute(db)
  await sql`create trigger append_only before update or delete on terms_signature for each row execute function refuse_change()`.execute(db)
}
