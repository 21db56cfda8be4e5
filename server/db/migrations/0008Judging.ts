import { sql, type Kysely } from 'kysely'

/**
 * How each attic was last judged, kept by the command that judges it; unit_status adds these up.
 * A finding keeps its advice; of the reviews asked for by hand one runs at a time in an organisation.
 */
export async function up(db: Kysely<unknown>) {
  await sql`create table attic_status (
    attic_id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    load_state text not null check (load_state in ('within', 'near', 'over', 'hold', 'unsurveyed')),
    utilisation double precision check (utilisation >= 0),
    stored_lb double precision not null check (stored_lb >= 0),
    rated_psf double precision check (rated_psf >= 0),
    judged_at timestamptz not null,
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id)
  )`.execute(db)
  await sql`create index attic_status_of_unit on attic_status (unit_id)`.execute(db)
  await sql`alter table finding add column advice_code text not null`.execute(db)
  await sql`create unique index review_run_one_asked_for on review_run (organisation_id) where asked_by is not null and finished_at is null`.execute(db)
}
