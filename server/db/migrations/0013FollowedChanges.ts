import { sql, type Kysely } from 'kysely'

/**
 * How often an organisation's data has changed, so that an answer made before can be told to be still true.
 * A row for each of 64 groups of connections: writers on different connections do not wait for each other.
 * Each transaction counts once; its count becomes visible together with what it changed.
 */
export async function up(db: Kysely<unknown>) {
  await sql`create table organisation_change (
    organisation_id uuid not null,
    writer_group smallint not null,
    changes bigint not null,
    by_transaction xid8 not null,
    primary key (organisation_id, writer_group)
  ) with (fillfactor = 50)`.execute(db)
  await sql`create function count_change(changed uuid[]) returns void language sql as $$
    insert into organisation_change as c (organisation_id, writer_group, changes, by_transaction)
    select id, pg_backend_pid() % 64, 1, pg_current_xact_id() from unnest(changed) as id where id is not null order by id
    on conflict (organisation_id, writer_group) do update set changes = c.changes + 1, by_transaction = excluded.by_transaction
      where c.by_transaction <> excluded.by_transaction
  $$`.execute(db)
  await sql`create function follow_rows() returns trigger language plpgsql as $$
    begin perform count_change(array(select distinct organisation_id from changed_rows)); return null; end $$`.execute(db)
  await sql`create function follow_organisations() returns trigger language plpgsql as $$
    begin perform count_change(array(select id from changed_rows)); return null; end $$`.execute(db)
  await sql`create function follow_people() returns trigger language plpgsql as $$
    begin perform count_change(array(select distinct m.organisation_id from changed_rows p join membership m on m.user_id = p.id)); return null; end $$`.execute(db)
}
