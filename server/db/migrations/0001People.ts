import { sql, type Kysely } from 'kysely'

/** Organisations, people and how they come in. E-mail addresses are kept in lower case. */
export async function up(db: Kysely<unknown>) {
  await sql`create extension if not exists btree_gist`.execute(db)
  await sql`create table organisation (
    id uuid primary key,
    name text not null check (length(name) between 1 and 120),
    time_zone text not null default 'America/New_York',
    currency char(3) not null default 'USD' check (currency ~ '^[A-Z]{3}$'),
    contact_phone text check (length(contact_phone) <= 40),
    danger_response_hours integer not null default 24 check (danger_response_hours between 1 and 720),
    urgent_response_hours integer not null default 72 check (urgent_response_hours between 1 and 720),
    routine_response_days integer not null default 30 check (routine_response_days between 1 and 365),
    entry_notice_hours integer not null default 24 check (entry_notice_hours between 0 and 720),
    review_hour integer not null default 6 check (review_hour between 0 and 23),
    season_allowance_mm double precision not null default 1.5 check (season_allowance_mm between 0 and 50),
    is_demo boolean not null default false,
    last_number integer not null default 0,
    created_at timestamptz not null,
    version integer not null default 1
  )`.execute(db)
  await sql`create table app_user (
    id uuid primary key,
    email text not null unique check (email = lower(email) and length(email) between 3 and 254),
    name text not null check (length(name) between 1 and 120),
    phone text check (length(phone) <= 40),
    password_hash text not null,
    session_epoch integer not null default 1,
    units_of_measure text not null default 'us' check (units_of_measure in ('us', 'metric')),
    mail_refused_at timestamptz,
    created_at timestamptz not null,
    version integer not null default 1
  )`.execute(db)
  await sql`create table membership (
    id uuid primary key,
    organisation_id uuid not null references organisation,
    user_id uuid not null references app_user,
    role text not null check (role in ('owner', 'manager', 'tenant', 'trades', 'engineer')),
    digest boolean not null default true,
    last_looked_at timestamptz,
    created_at timestamptz not null,
    ended_at timestamptz,
    unique (organisation_id, user_id)
  )`.execute(db)
  await sql`create index membership_user on membership (user_id) where ended_at is null`.execute(db)
  await sql`create table password_reset (
    id uuid primary key,
    user_id uuid not null references app_user,
    token_hash text not null unique,
    expires_at timestamptz not null,
    used_at timestamptz,
    created_at timestamptz not null
  )`.execute(db)
  await sql`create table attempt_limit (key varchar(255) primary key, points integer not null default 0, expire bigint)`.execute(db)
}
