import { sql, type Kysely } from 'kysely'

/** Property tree, tenancies, and who else may see one unit. Composite keys keep every row inside its organisation. */
export async function up(db: Kysely<unknown>) {
  await sql`create table property (
    id uuid primary key,
    organisation_id uuid not null references organisation,
    name text not null check (length(name) between 1 and 160),
    address_lines text[] not null default '{}' check (cardinality(address_lines) <= 8),
    year_built integer check (year_built between 1500 and 2200),
    notes text not null default '' check (length(notes) <= 5000),
    archived_at timestamptz,
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id)
  )`.execute(db)
  await sql`create index property_list on property (organisation_id, name, id)`.execute(db)
  await sql`create table unit (
    id uuid primary key,
    organisation_id uuid not null,
    property_id uuid not null,
    name text not null check (length(name) between 1 and 160),
    notes text not null default '' check (length(notes) <= 5000),
    access_notes text not null default '' check (length(access_notes) <= 2000),
    archived_at timestamptz,
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id),
    foreign key (organisation_id, property_id) references property (organisation_id, id)
  )`.execute(db)
  await sql`create index unit_of_property on unit (organisation_id, property_id, name, id)`.execute(db)
  await sql`create table tenancy (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    tenant_name text not null check (length(tenant_name) between 1 and 160),
    starts_on date not null,
    ends_on date,
    notes text not null default '' check (length(notes) <= 2000),
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    check (ends_on is null or ends_on >= starts_on),
    constraint tenancy_no_overlap exclude using gist (unit_id with =, daterange(starts_on, ends_on, '[]') with &&)
  )`.execute(db)
  await sql`create table tenancy_person (
    tenancy_id uuid not null,
    organisation_id uuid not null,
    user_id uuid not null references app_user,
    primary key (tenancy_id, user_id),
    foreign key (organisation_id, tenancy_id) references tenancy (organisation_id, id)
  )`.execute(db)
  await sql`create index tenancy_person_user on tenancy_person (user_id, organisation_id)`.execute(db)
  await sql`create table unit_access (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    user_id uuid not null references app_user,
    until_on date,
    created_at timestamptz not null,
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    unique (unit_id, user_id)
  )`.execute(db)
  await sql`create index unit_access_user on unit_access (user_id, organisation_id)`.execute(db)
  await sql`create table room (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    name text not null check (length(name) between 1 and 120),
    is_bedroom boolean not null default false,
    length_ft double precision check (length_ft > 0 and length_ft <= 200),
    width_ft double precision check (width_ft > 0 and width_ft <= 200),
    ceiling_height_in double precision check (ceiling_height_in > 0 and ceiling_height_in <= 600),
    ceiling_finish text not null default 'unknown',
    sort integer not null default 0,
    archived_at timestamptz,
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id)
  )`.execute(db)
  await sql`create index room_of_unit on room (unit_id, sort, id)`.execute(db)
  await sql`create table invitation (
    id uuid primary key,
    organisation_id uuid not null references organisation,
    email text not null check (email = lower(email)),
    role text not null check (role in ('owner', 'manager', 'tenant', 'trades', 'engineer')),
    unit_id uuid,
    tenancy_id uuid,
    token_hash text not null unique,
    invited_by uuid not null references app_user,
    expires_at timestamptz not null,
    accepted_at timestamptz,
    revoked_at timestamptz,
    created_at timestamptz not null,
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    foreign key (organisation_id, tenancy_id) references tenancy (organisation_id, id),
    check (role not in ('tenant', 'engineer') or unit_id is not null)
  )`.execute(db)
  await sql`create index invitation_list on invitation (organisation_id, created_at, id)`.execute(db)
}
