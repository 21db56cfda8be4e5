import { sql, type Kysely } from 'kysely'

/** Attics, every survey ever made of them, what is stored, and the append-only load history. */
export async function up(db: Kysely<unknown>) {
  await sql`create table attic (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    name text not null check (length(name) between 1 and 120),
    notes text not null default '' check (length(notes) <= 5000),
    inventory_confirmed_on date,
    archived_at timestamptz,
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id)
  )`.execute(db)
  await sql`create index attic_of_unit on attic (unit_id, name, id)`.execute(db)
  await sql`create index attic_list on attic (organisation_id, name, id)`.execute(db)
  await sql`create table attic_survey (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    attic_id uuid not null,
    surveyed_on date not null,
    answers jsonb not null,
    rated_psf double precision not null check (rated_psf >= 0 and rated_psf <= 500),
    on_hold boolean not null,
    basis text not null,
    surveyed_by uuid not null references app_user,
    created_at timestamptz not null,
    unique (organisation_id, id),
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id)
  )`.execute(db)
  await sql`create index attic_survey_latest on attic_survey (attic_id, created_at desc, id desc)`.execute(db)
  await sql`create table attic_document (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    attic_id uuid not null,
    kind text not null check (kind in ('engineer-letter', 'permit', 'truss-drawing', 'inspection-record')),
    rated_psf double precision check (rated_psf >= 0 and rated_psf <= 500),
    lifts_hold boolean not null default false,
    written_on date not null,
    written_by text not null check (length(written_by) between 1 and 200),
    covers_whole_attic boolean not null,
    area text not null default '' check (length(area) <= 500),
    file_name text not null,
    media_type text not null,
    byte_length integer not null check (byte_length > 0),
    sha256 char(64) not null,
    stored_key text not null,
    added_by uuid not null references app_user,
    created_at timestamptz not null,
    withdrawn_at timestamptz,
    foreign key (organisation_id, attic_id) references attic (organisation_id, id)
  )`.execute(db)
  await sql`create index attic_document_of on attic_document (attic_id, created_at)`.execute(db)
  await sql`create table attic_item (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    attic_id uuid not null,
    field_number integer not null default 1 check (field_number between 1 and 20),
    catalogue_key text,
    name text not null check (length(name) between 1 and 160),
    category text not null default 'other',
    quantity integer not null default 1 check (quantity between 1 and 1000),
    low_lb double precision not null check (low_lb >= 0),
    typical_lb double precision not null check (typical_lb > 0 and typical_lb <= 20000),
    high_lb double precision not null,
    weight_source text not null check (weight_source in ('catalogue', 'estimate', 'weighed')),
    belongs_to text not null default 'landlord' check (belongs_to in ('landlord', 'tenant')),
    x_ft double precision not null check (x_ft >= 0 and x_ft <= 100),
    y_ft double precision not null check (y_ft >= 0 and y_ft <= 200),
    length_ft double precision not null check (length_ft > 0 and length_ft <= 40),
    width_ft double precision not null check (width_ft > 0 and width_ft <= 40),
    height_ft double precision check (height_ft > 0 and height_ft <= 20),
    placed_on date not null,
    removed_on date,
    notes text not null default '' check (length(notes) <= 2000),
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id),
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    check (low_lb <= typical_lb and typical_lb <= high_lb),
    check (removed_on is null or removed_on >= placed_on)
  )`.execute(db)
  await sql`create index attic_item_in on attic_item (attic_id, created_at, id) where removed_on is null`.execute(db)
  await sql`create table load_event (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    attic_id uuid not null,
    item_id uuid not null,
    kind text not null check (kind in ('in', 'out', 'moved', 'reweighed')),
    happened_on date not null,
    delta_lb double precision not null,
    total_after_lb double precision not null check (total_after_lb >= 0),
    detail jsonb not null default '{}',
    recorded_by uuid not null references app_user,
    recorded_at timestamptz not null,
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    foreign key (organisation_id, item_id) references attic_item (organisation_id, id)
  )`.execute(db)
  await sql`create index load_event_of on load_event (attic_id, happened_on, recorded_at)`.execute(db)
}
