import { sql, type Kysely } from 'kysely'

/** Another table of live loads than IRC R301.5 for one property, with its name and note; null: the code's own. */
export async function up(db: Kysely<unknown>) {
  await sql`alter table property add column code_basis jsonb check (code_basis is null or (jsonb_typeof(code_basis) = 'object' and code_basis ? 'name' and code_basis ? 'psf'))`.execute(db)
}
