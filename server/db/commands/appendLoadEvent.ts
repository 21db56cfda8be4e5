import type { Trx } from '../connect'
import { sumStoredLb } from '../queries/attics'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import type { RecordActor } from './appendRecord'
import type { LoadEventTable } from '../schema/attics'

interface LoadChange {
  item: { id: string, organisationId: string, unitId: string, atticId: string }
  kind: LoadEventTable['kind']
  happenedOn: string
  deltaLb: number
  detail?: object
}

/** One step of the attic's load history; the total is what stands there after this change was written. */
export async function appendLoadEvent(trx: Trx, actor: RecordActor & { userId: string }, { item, detail, ...change }: LoadChange) {
  await trx.insertInto('loadEvent').values({
    id: newId(), organisationId: item.organisationId, unitId: item.unitId, atticId: item.atticId, itemId: item.id,
    ...change, detail: JSON.stringify(detail ?? {}), totalAfterLb: await sumStoredLb(trx, item.atticId),
    recordedBy: actor.userId, recordedAt: nowInstant(),
  }).execute()
}
