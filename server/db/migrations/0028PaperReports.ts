import { sql, type Kysely } from 'kysely'

/** A report that was filled in on paper: by whom, and on which day. When the server received it stays apart, in received_at. */
export async function up(db: Kysely<unknown>) {
  await sql`alter table observation
    add column paper_reporter text check (length(paper_reporter) between 1 and 160),
    add column paper_filled_in_on date,
    add constraint observation_paper check ((paper_reporter is null) = (paper_filled_in_on is null))`.execute(db)
}
