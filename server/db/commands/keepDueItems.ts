import { dueItems, type DueItem } from '../../../shared/utils/upkeep/dueItems'
import type { Trx } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { findDueInput, type ReviewedUnit } from '../queries/reviewing'

/**
 * Makes the open due items of a unit be what is due today: adds what fell due, settles what was done. An item that is still
 * due keeps its row, and with it the count of reminders.
 */
export async function keepDueItems(trx: Trx, unit: ReviewedUnit): Promise<{ due: number }> {
  const wanted = unit.archivedAt ? [] : dueItems(await findDueInput(trx, unit), dayIn(unit.timeZone))
  const open = await trx.selectFrom('dueItem').select(['id', 'kind', 'subjectId']).where('unitId', '=', unit.id).where('settledAt', 'is', null).execute()
  const keyOf = (item: { kind: string, subjectId: string }) => `${item.kind} ${item.subjectId}`
  const wantedKeys = new Set(wanted.map(keyOf))
  const openKeys = new Set(open.map(keyOf))
  const done = open.filter(item => !wantedKeys.has(keyOf(item))).map(item => item.id)
  if (done.length > 0) await trx.updateTable('dueItem').set({ settledAt: nowInstant() }).where('id', 'in', done).execute()
  const added = wanted.filter(item => !openKeys.has(keyOf(item)))
  if (added.length > 0) await addDueItems(trx, unit, added)
  return { due: wantedKeys.size }
}

/** The same thing due on the same day again, after it was settled, opens its old row: a job sent back, a reading taken away. */
async function addDueItems(trx: Trx, unit: ReviewedUnit, items: DueItem[]) {
  await trx.insertInto('dueItem')
    .values(items.map(({ kind, subjectId, dueOn }) => ({ id: newId(), organisationId: unit.organisationId, unitId: unit.id, kind, subjectId, dueOn, lastRemindedOn: null, settledAt: null, createdAt: nowInstant() })))
    .onConflict(conflict => conflict.columns(['kind', 'subjectId', 'dueOn']).doUpdateSet({ settledAt: null }))
    .execute()
}
