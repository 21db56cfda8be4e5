import { sql, type Kysely } from 'kysely'

/** Two marks that turned out to be one: what came over is listed part by part, so that it can go back. */
export async function up(db: Kysely<unknown>) {
  await sql`create table mark_joining (
    id uuid primary key,
    organisation_id uuid not null,
    mark_id uuid not null,
    into_id uuid not null,
    reason text not null check (length(reason) between 1 and 500),
    state_before text not null check (state_before in ('open', 'repaired', 'closed')),
    joined_by uuid not null references app_user,
    joined_at timestamptz not null,
    undone_by uuid references app_user,
    undone_at timestamptz,
    unique (organisation_id, id),
    foreign key (organisation_id, mark_id) references mark (organisation_id, id),
    foreign key (organisation_id, into_id) references mark (organisation_id, id),
    check (mark_id <> into_id),
    check ((undone_at is null) = (undone_by is null))
  )`.execute(db)
  await sql`create unique index mark_joining_standing on mark_joining (mark_id) where undone_at is null`.execute(db)
  await sql`create index mark_joining_into on mark_joining (into_id) where undone_at is null`.execute(db)
  await sql`create table mark_joining_part (
    joining_id uuid not null,
    organisation_id uuid not null,
    kind text not null check (kind in ('reading', 'observation', 'photo', 'job', 'mark_repair')),
    part_id uuid not null,
    primary key (joining_id, kind, part_id),
    foreign key (organisation_id, joining_id) references mark_joining (organisation_id, id)
  )`.execute(db)
  await sql`create index mark_joining_part_of on mark_joining_part (part_id)`.execute(db)
  await sql`alter table mark add column joined_into uuid,
    add foreign key (organisation_id, joined_into) references mark (organisation_id, id),
    add check (joined_into is null or state = 'closed')`.execute(db)
}
