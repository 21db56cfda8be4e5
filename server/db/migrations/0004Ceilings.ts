import { sql, type Kysely } from 'kysely'

/** Marks on ceilings, what people reported, dated readings and photos. */
export async function up(db: Kysely<unknown>) {
  await sql`create table mark (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    room_id uuid not null,
    attic_id uuid,
    number integer not null,
    kind text not null check (kind in ('crack', 'nail-pops', 'sag', 'stain')),
    label text not null check (length(label) between 1 and 160),
    pin_x double precision not null check (pin_x between 0 and 1),
    pin_y double precision not null check (pin_y between 0 and 1),
    place text,
    shape text,
    direction text,
    first_seen_on date not null,
    state text not null default 'open' check (state in ('open', 'repaired', 'closed')),
    segment integer not null default 1 check (segment >= 1),
    activity text not null default 'too-few-readings' check (activity in ('too-few-readings', 'dormant', 'watch', 'active')),
    width_class integer check (width_class between 0 and 5),
    last_value double precision,
    last_read_on date,
    slope_per_year double precision,
    next_reading_on date,
    stain_state text check (stain_state in ('dry', 'damp', 'dripping')),
    notes text not null default '' check (length(notes) <= 5000),
    created_by uuid not null references app_user,
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id),
    unique (organisation_id, number),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    foreign key (organisation_id, room_id) references room (organisation_id, id),
    foreign key (organisation_id, attic_id) references attic (organisation_id, id)
  )`.execute(db)
  await sql`create index mark_of_unit on mark (unit_id, created_at, id)`.execute(db)
  await sql`create index mark_list on mark (organisation_id, number desc)`.execute(db)
  await sql`create index mark_due on mark (organisation_id, next_reading_on) where state = 'open'`.execute(db)
  await sql`create table observation (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    room_id uuid not null,
    mark_id uuid not null,
    number integer not null,
    answers jsonb not null,
    danger_signs text[] not null default '{}',
    reported_by uuid not null references app_user,
    client_key uuid not null,
    received_at timestamptz not null,
    started_at timestamptz,
    corrected_at timestamptz,
    unique (organisation_id, id),
    unique (organisation_id, number),
    unique (reported_by, client_key),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    foreign key (organisation_id, mark_id) references mark (organisation_id, id)
  )`.execute(db)
  await sql`create index observation_of_mark on observation (mark_id, received_at)`.execute(db)
  await sql`create table reading (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    mark_id uuid not null,
    segment integer not null check (segment >= 1),
    taken_on date not null,
    value double precision check (value >= 0 and value <= 100000),
    quantity text not null check (quantity in ('width_mm', 'pop_count', 'drop_mm', 'size_mm')),
    sigma double precision check (sigma > 0),
    low double precision check (low >= 0),
    high double precision,
    length_mm double precision check (length_mm >= 0 and length_mm <= 100000),
    method text not null check (method in ('guess', 'coin-or-card', 'ruler', 'photo-with-scale', 'gauge-card', 'tell-tale', 'calipers', 'count', 'string-line', 'could-not-measure')),
    could_not_measure_reason text check (length(could_not_measure_reason) between 1 and 500),
    stain_state text check (stain_state in ('dry', 'damp', 'dripping')),
    note text not null default '' check (length(note) <= 2000),
    detail jsonb not null default '{}',
    taken_by uuid not null references app_user,
    client_key uuid not null,
    received_at timestamptz not null,
    unique (organisation_id, id),
    unique (taken_by, client_key),
    foreign key (organisation_id, mark_id) references mark (organisation_id, id),
    check ((value is null) = (method = 'could-not-measure')),
    check (value is null or sigma is not null),
    check (high is null or low is null or low <= high)
  )`.execute(db)
  await sql`create index reading_of_mark on reading (mark_id, taken_on, received_at)`.execute(db)
  await sql`create table photo (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    mark_id uuid,
    observation_id uuid,
    reading_id uuid,
    item_id uuid,
    job_id uuid,
    view text not null default 'close' check (view in ('wide', 'close', 'before', 'after', 'item')),
    sha256 char(64) not null,
    width_px integer not null check (width_px > 0),
    height_px integer not null check (height_px > 0),
    byte_length integer not null check (byte_length > 0),
    stored_key text not null,
    camera_time text,
    uploaded_by uuid not null references app_user,
    uploaded_at timestamptz not null,
    unique (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    foreign key (organisation_id, mark_id) references mark (organisation_id, id),
    foreign key (organisation_id, observation_id) references observation (organisation_id, id),
    foreign key (organisation_id, reading_id) references reading (organisation_id, id),
    foreign key (organisation_id, item_id) references attic_item (organisation_id, id)
  )`.execute(db)
  await sql`create index photo_of_mark on photo (mark_id, uploaded_at)`.execute(db)
  await sql`create index photo_of_observation on photo (observation_id)`.execute(db)
}
