import { sql, type Kysely } from 'kysely'

/** What the system concluded, what is to be done, what was mailed, and the summary the portfolio reads. */
export async function up(db: Kysely<unknown>) {
  await sql`create table finding (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    rule text not null,
    subject_kind text not null check (subject_kind in ('attic', 'mark', 'item', 'job', 'unit', 'observation')),
    subject_id uuid not null,
    severity text not null check (severity in ('notice', 'attention', 'urgent')),
    evidence jsonb not null,
    opened_at timestamptz not null,
    changed_at timestamptz not null,
    acknowledged_at timestamptz,
    acknowledged_by uuid references app_user,
    acknowledged_reason text check (length(acknowledged_reason) between 1 and 1000),
    look_again_on date,
    cleared_at timestamptz,
    version integer not null default 1,
    unique (organisation_id, id),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id)
  )`.execute(db)
  await sql`create unique index finding_one_open on finding (rule, subject_id) where cleared_at is null`.execute(db)
  await sql`create index finding_open_list on finding (organisation_id, opened_at desc, id) where cleared_at is null`.execute(db)
  await sql`create index finding_of_unit on finding (unit_id, opened_at desc)`.execute(db)
  await sql`create table finding_event (
    id uuid primary key,
    organisation_id uuid not null,
    finding_id uuid not null,
    kind text not null check (kind in ('opened', 'escalated', 'eased', 'acknowledged', 'returned', 'cleared')),
    severity text not null,
    evidence jsonb not null,
    reason text,
    actor_id uuid references app_user,
    happened_at timestamptz not null,
    foreign key (organisation_id, finding_id) references finding (organisation_id, id)
  )`.execute(db)
  await sql`create index finding_event_of on finding_event (finding_id, happened_at)`.execute(db)
  await sql`create table job (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    number integer not null,
    title text not null check (length(title) between 1 and 200),
    description text not null default '' check (length(description) <= 5000),
    finding_id uuid,
    mark_id uuid,
    attic_id uuid,
    priority text not null default 'routine' check (priority in ('danger', 'urgent', 'routine')),
    state text not null default 'planned' check (state in ('planned', 'scheduled', 'done', 'confirmed', 'cancelled')),
    assignee_user_id uuid references app_user,
    scheduled_on date,
    due_on date not null,
    done_on date,
    outcome text check (length(outcome) <= 5000),
    cost_cents bigint check (cost_cents >= 0 and cost_cents <= 1000000000),
    created_by uuid not null references app_user,
    created_at timestamptz not null,
    version integer not null default 1,
    unique (organisation_id, id),
    unique (organisation_id, number),
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    foreign key (organisation_id, finding_id) references finding (organisation_id, id),
    foreign key (organisation_id, mark_id) references mark (organisation_id, id),
    foreign key (organisation_id, attic_id) references attic (organisation_id, id),
    check ((state in ('done', 'confirmed')) = (done_on is not null))
  )`.execute(db)
  await sql`alter table photo add foreign key (organisation_id, job_id) references job (organisation_id, id)`.execute(db)
  await sql`create index job_list on job (organisation_id, due_on, id)`.execute(db)
  await sql`create index job_of_unit on job (unit_id, due_on)`.execute(db)
  await sql`create index job_assignee on job (assignee_user_id, due_on)`.execute(db)
  await sql`create table due_item (
    id uuid primary key,
    organisation_id uuid not null,
    unit_id uuid not null,
    kind text not null,
    subject_id uuid not null,
    due_on date not null,
    reminders_sent integer not null default 0,
    last_reminded_on date,
    settled_at timestamptz,
    created_at timestamptz not null,
    foreign key (organisation_id, unit_id) references unit (organisation_id, id),
    unique (kind, subject_id, due_on)
  )`.execute(db)
  await sql`create index due_item_open on due_item (organisation_id, due_on) where settled_at is null`.execute(db)
  await sql`create table message (
    id uuid primary key,
    organisation_id uuid references organisation,
    user_id uuid references app_user,
    kind text not null,
    mail_class text not null check (mail_class in ('safety', 'duty', 'habit', 'account')),
    to_address text not null,
    subject text not null,
    text_body text not null,
    html_body text not null,
    dedupe_key text not null unique,
    state text not null default 'queued' check (state in ('queued', 'sent', 'failed')),
    attempts integer not null default 0,
    last_error text,
    created_at timestamptz not null,
    sent_at timestamptz
  )`.execute(db)
  await sql`create index message_waiting on message (created_at) where state = 'queued'`.execute(db)
  await sql`create index message_list on message (organisation_id, created_at desc)`.execute(db)
  await sql`create table review_run (
    id uuid primary key,
    organisation_id uuid not null references organisation,
    reviewed_on date not null,
    asked_by uuid references app_user,
    started_at timestamptz not null,
    finished_at timestamptz,
    counts jsonb not null default '{}',
    error text
  )`.execute(db)
  await sql`create unique index review_run_once_a_day on review_run (organisation_id, reviewed_on) where asked_by is null`.execute(db)
  await sql`create index review_run_list on review_run (organisation_id, started_at desc)`.execute(db)
  await sql`create table unit_status (
    unit_id uuid primary key,
    organisation_id uuid not null,
    property_id uuid not null,
    worst_severity text check (worst_severity in ('notice', 'attention', 'urgent')),
    open_findings integer not null default 0,
    top_finding_id uuid,
    attic_count integer not null default 0,
    load_state text check (load_state in ('within', 'near', 'over', 'hold', 'unsurveyed')),
    utilisation double precision,
    stored_lb double precision not null default 0,
    open_marks integer not null default 0,
    active_marks integer not null default 0,
    late_readings integer not null default 0,
    changed_at timestamptz not null,
    foreign key (organisation_id, unit_id) references unit (organisation_id, id)
  )`.execute(db)
  await sql`create index unit_status_list on unit_status (organisation_id, worst_severity, changed_at)`.execute(db)
}
