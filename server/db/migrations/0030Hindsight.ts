import { sql, type Kysely } from 'kysely'

/** Limits of the movement rules, editable per organisation, and findings judged right or wrong later. Defaults are ours. */
export async function up(db: Kysely<unknown>) {
  await sql`alter table organisation
    add column truss_allowance_mm double precision not null default 20 check (truss_allowance_mm between 0 and 50),
    add column least_readings integer not null default 6 check (least_readings between 5 and 24),
    add column least_days integer not null default 90 check (least_days between 60 and 365),
    add column p_rising double precision not null default 0.01 check (p_rising between 0.001 and 0.05),
    add column dormant_within_mm_per_year double precision not null default 0.5 check (dormant_within_mm_per_year between 0.1 and 2),
    add column least_jump_mm double precision not null default 1 check (least_jump_mm between 0.3 and 3),
    add column jump_sigmas double precision not null default 4 check (jump_sigmas between 2 and 6),
    add column more_pops integer not null default 3 check (more_pops between 1 and 10)`.execute(db)
  await sql`create table finding_hindsight (
    id uuid primary key,
    organisation_id uuid not null,
    finding_id uuid not null,
    outcome text not null check (outcome in ('right', 'wrong')),
    reason text not null check (length(reason) between 1 and 1000),
    judged_by uuid not null references app_user,
    judged_at timestamptz not null,
    foreign key (organisation_id, finding_id) references finding (organisation_id, id)
  )`.execute(db)
  await sql`create index finding_hindsight_of on finding_hindsight (finding_id, judged_at desc, id desc)`.execute(db)
  await sql`create index finding_all_list on finding (organisation_id, opened_at desc, id desc)`.execute(db)
  await sql`create trigger append_only before update or delete on finding_hindsight for each row execute function refuse_change()`.execute(db)
  await sql`create trigger append_only_truncate before truncate on finding_hindsight for each statement execute function refuse_change()`.execute(db)
}
