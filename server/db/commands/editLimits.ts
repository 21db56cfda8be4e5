import type { LimitsEditValue } from '../../../shared/schemas/limits'
import type { LimitsView } from '../../../shared/types/limits'
import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import { findLimitsView } from '../queries/limits'
import { editRow } from './editRow'

/** Sets the organisation's limits; the next review judges every mark by them, and a mark at once when something of it changes. */
export async function editLimits(db: Db, actor: Actor, { version, ...patch }: LimitsEditValue): Promise<LimitsView> {
  await db.transaction().execute(trx => editRow(trx, actor, {
    table: 'organisation', id: actor.organisationId, version, patch,
    record: { organisationId: actor.organisationId, unitId: null, subjectKind: 'organisation', action: 'limits changed' },
  }))
  return findLimitsView(db, actor)
}
