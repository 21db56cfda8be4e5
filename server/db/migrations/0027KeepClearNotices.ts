import { sql, type Kysely } from 'kysely'

/** A notice for the room below: raised while there is a cause, stands until somebody lifts it with a reason, one open a room, never deleted. */
export async function up(db: Kysely<unknown>) {
  await sql`create table keep_clear_notice (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    room_id uuid not null,
    cause text not null check (cause in ('attic-over', 'attic-on-hold', 'danger-sign')),
    attic_id uuid,
    finding_id uuid,
    area text not null check (length(area) between 1 and 200),
    waiting_for text not null check (length(waiting_for) between 1 and 500),
    raised_at timestamptz not null,
    raised_by uuid not null references app_user,
    lifted_at timestamptz,
    lifted_by uuid references app_user,
    lifted_reason text check (length(lifted_reason) between 1 and 1000),
    unique (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    foreign key (organisation_id, room_id) references room (organisation_id, id),
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    foreign key (organisation_id, finding_id) references finding (organisation_id, id),
    check (case cause when 'danger-sign' then finding_id is not null and attic_id is null else attic_id is not null and finding_id is null end),
    check (num_nulls(lifted_at, lifted_by, lifted_reason) in (0, 3)),
    check (lifted_at is null or lifted_at >= raised_at)
  )`.execute(db)
  await sql`create unique index keep_clear_one_open on keep_clear_notice (room_id) where lifted_at is null`.execute(db)
  await sql`create index keep_clear_of_unit on keep_clear_notice (unit_id, raised_at desc, id)`.execute(db)
}
