import type { Db } from '../connect'
import { nowInstant } from '../../utils/clock'

/** A review asked for by hand that failed every try is over, with its reason; a day's own run stays open for the next quarter of an hour. */
export async function failReview(db: Db, { organisationId, runId }: { organisationId: string, runId?: string }): Promise<void> {
  if (!runId) return
  await db.updateTable('reviewRun').set(eb => ({ finishedAt: nowInstant(), error: eb.fn.coalesce('error', eb.val('It could not be done.')) }))
    .where('id', '=', runId).where('organisationId', '=', organisationId).where('finishedAt', 'is', null).execute()
}
