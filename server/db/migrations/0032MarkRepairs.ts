import { sql, type Kysely } from 'kysely'

/**
 * Each repair of a mark with its day, since a reading belongs to the segment of the day it was taken on, whenever it is entered.
 * Repairs known before stand in the record. Two readings one after another show how closely a person reads.
 */
export async function up(db: Kysely<unknown>) {
  await sql`create table mark_repair (
    id uuid primary key,
    organisation_id uuid not null,
    mark_id uuid not null,
    repaired_on date not null,
    reason text not null check (length(reason) between 1 and 500),
    recorded_by uuid not null references app_user,
    recorded_at timestamptz not null,
    unique (organisation_id, id),
    foreign key (organisation_id, mark_id) references mark (organisation_id, id)
  )`.execute(db)
  await sql`create index mark_repair_of on mark_repair (mark_id, repaired_on, recorded_at)`.execute(db)
  await sql`insert into mark_repair (id, organisation_id, mark_id, repaired_on, reason, recorded_by, recorded_at)
    select gen_random_uuid(), m.organisation_id, m.id, (e.after ->> 'happenedOn')::date, e.after ->> 'reason', e.actor_id, e.recorded_at
    from record_entry e join mark m on m.id = e.subject_id
    where e.subject_kind = 'mark' and e.action = 'mark repaired' and e.actor_id is not null`.execute(db)
  await sql`alter table reading
    add column first_value double precision check (first_value >= 0),
    add column second_value double precision check (second_value >= 0),
    add check ((first_value is null) = (second_value is null))`.execute(db)
  await sql`create index reading_double_of on reading (taken_by, method, quantity, received_at desc) where second_value is not null`.execute(db)
}
