import { sql } from 'kysely'
import type { Db, Trx } from '../connect'
import { appendRecord, type RecordActor } from './appendRecord'
import { clash, notFound } from '../../utils/problems'

type EditableTable = 'property' | 'unit' | 'room' | 'tenancy' | 'attic' | 'atticItem' | 'mark' | 'job' | 'organisation' | 'unloadTrial'

interface Edit {
  table: EditableTable
  id: string
  version: number
  patch: Record<string, unknown>
  record: { organisationId: string, unitId: string | null, subjectKind: string, action: string }
}

/**
 * One optimistic edit with its record entry: 409 with the other version when `version` is stale.
 * Only the fields that really change are written and recorded; returns the row as it stands now.
 */
export async function editRow<T extends { version: number }>(trx: Trx, actor: RecordActor, edit: Edit): Promise<T> {
  const table = sql.table(snake(edit.table))
  const found = await sql<T & Record<string, unknown>>`select * from ${table} where id = ${edit.id} for update`.execute(trx)
  const before = found.rows[0]
  if (!before) throw notFound()
  if (before.version !== edit.version) throw clash(before)
  const changed = Object.entries(edit.patch).filter(([key, value]) => value !== undefined && JSON.stringify(before[key]) !== JSON.stringify(value))
  if (changed.length === 0) return before
  const sets = sql.join([...changed.map(([key, value]) => sql`${sql.ref(snake(key))} = ${value}`), sql`version = version + 1`])
  const after = await sql<T & Record<string, unknown>>`update ${table} set ${sets} where id = ${edit.id} returning *`.execute(trx)
  await appendRecord(trx, actor, {
    ...edit.record, subjectId: edit.id,
    before: Object.fromEntries(changed.map(([key]) => [key, before[key] ?? null])),
    after: Object.fromEntries(changed),
  })
  return after.rows[0]!
}

const snake = (name: string) => name.replace(/[A-Z]/g, letter => `_${letter.toLowerCase()}`)

/** The same in a transaction of its own, for edits that nothing else hangs on. */
export const editRowAlone = <T extends { version: number }>(db: Db, actor: RecordActor, edit: Edit): Promise<T> =>
  db.transaction().execute(trx => editRow<T>(trx, actor, edit))
