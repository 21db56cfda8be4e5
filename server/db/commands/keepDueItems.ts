import { sql } from 'kysely'
import type { DueItem } from '../../../shared/utils/upkeep/dueItems'
import type { Trx } from '../connect'
import { rowSet } from '../rowSet'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'

interface OpenDue { id: string, kind: string, subjectId: string }

/** The open due items of one unit, and what is due there today. */
export interface JudgedDue { organisationId: string, unitId: string, open: readonly OpenDue[], wanted: readonly DueItem[] }

const keyOf = (item: { kind: string, subjectId: string }) => `${item.kind} ${item.subjectId}`

export function dueChanges({ open, wanted }: JudgedDue): { done: OpenDue[], added: DueItem[] } {
  const wantedKeys = new Set(wanted.map(keyOf))
  const openKeys = new Set(open.map(keyOf))
  return { done: open.filter(item => !wantedKeys.has(keyOf(item))), added: wanted.filter(item => !openKeys.has(keyOf(item))) }
}

/**
 * Makes the open due items of units be what is due today: adds what fell due, settles what was done. An item that is still
 * due keeps its row, and with it the count of reminders. The same thing due on the same day again, after it was settled,
 * opens its old row: a job sent back, a reading taken away.
 */
export async function keepDueItems(trx: Trx, judged: readonly JudgedDue[]): Promise<void> {
  const changes = judged.map(one => ({ one, ...dueChanges(one) }))
  const done = changes.flatMap(change => change.done.map(item => item.id))
  const at = nowInstant()
  if (done.length > 0) await trx.updateTable('dueItem').set({ settledAt: at }).where('id', '=', sql<string>`any(${done}::uuid[])`).execute()
  const added = changes.flatMap(({ one, added: items }) => items.map(({ kind, subjectId, dueOn }) => ({ id: newId(), organisationId: one.organisationId, unitId: one.unitId, kind, subjectId, dueOn, createdAt: at })))
  if (added.length === 0) return
  const rows = rowSet(added, { id: 'uuid', organisationId: 'uuid', unitId: 'uuid', kind: 'text', subjectId: 'uuid', dueOn: 'date', createdAt: 'timestamptz' })
  await sql`insert into due_item (id, organisation_id, unit_id, kind, subject_id, due_on, created_at)
    select id, organisation_id, unit_id, kind, subject_id, due_on, created_at from ${rows}
    on conflict (kind, subject_id, due_on) do update set settled_at = null`.execute(trx)
}
