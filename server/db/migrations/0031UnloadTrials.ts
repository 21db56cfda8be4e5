import { sql, type Kysely } from 'kysely'

/** A planned unloading followed as an experiment: what is taken out, and which marks are read before and after. */
export async function up(db: Kysely<unknown>) {
  await sql`create table unload_trial (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    attic_id uuid not null,
    purpose text not null check (length(purpose) between 1 and 500),
    state text not null default 'planned' check (state in ('planned', 'unloaded', 'ended', 'given-up')),
    planned_on date not null,
    unloaded_on date,
    ended_on date,
    conclusion text not null default '' check (length(conclusion) <= 2000),
    created_by uuid not null references app_user,
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    check (state not in ('unloaded', 'ended') or unloaded_on is not null),
    check ((state in ('ended', 'given-up')) = (ended_on is not null)),
    check (ended_on is null or unloaded_on is null or ended_on >= unloaded_on)
  )`.execute(db)
  await sql`create unique index unload_trial_one_running on unload_trial (attic_id) where state in ('planned', 'unloaded')`.execute(db)
  await sql`create index unload_trial_list on unload_trial (organisation_id, created_at desc, id desc)`.execute(db)
  await sql`create table unload_trial_item (
    trial_id uuid not null,
    organisation_id uuid not null,
    item_id uuid not null,
    primary key (trial_id, item_id),
    foreign key (organisation_id, trial_id) references unload_trial (organisation_id, id),
    foreign key (organisation_id, item_id) references attic_item (organisation_id, id)
  )`.execute(db)
  await sql`create table unload_trial_mark (
    trial_id uuid not null,
    organisation_id uuid not null,
    mark_id uuid not null,
    primary key (trial_id, mark_id),
    foreign key (organisation_id, trial_id) references unload_trial (organisation_id, id),
    foreign key (organisation_id, mark_id) references mark (organisation_id, id)
  )`.execute(db)
  await sql`create index unload_trial_mark_of on unload_trial_mark (mark_id)`.execute(db)
}
