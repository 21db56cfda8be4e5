import type { Db } from '../connect'
import { orderReview } from '../../utils/background'
import { dayIn, now, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { problem } from '../../utils/problems'
import type { Actor } from '../queries/actor'
import { appendRecord } from './appendRecord'

/** Longer than the queue lets a review run: what is still open then has lost its worker. */
const LOST_AFTER_MS = 2 * 3_600_000

/** Asks for a review by hand; while one is under way, that one is the answer. */
export async function requestReview(db: Db, actor: Actor): Promise<{ runId: string, isNew: boolean }> {
  const { organisationId } = actor
  const runId = newId()
  const isNew = await db.transaction().execute(async (trx) => {
    await trx.updateTable('reviewRun').set({ finishedAt: nowInstant(), error: 'It was cut off.' })
      .where('organisationId', '=', organisationId).where('askedBy', 'is not', null).where('finishedAt', 'is', null).where('startedAt', '<', new Date(now().getTime() - LOST_AFTER_MS).toISOString()).execute()
    const { numInsertedOrUpdatedRows: written } = await trx.insertInto('reviewRun')
      .values({ id: runId, organisationId, reviewedOn: dayIn(actor.timeZone), askedBy: actor.userId, startedAt: nowInstant(), finishedAt: null, counts: '{}', error: null })
      .onConflict(conflict => conflict.doNothing()).executeTakeFirst()
    if (!written) return false
    await appendRecord(trx, actor, { organisationId, unitId: null, subjectKind: 'review', subjectId: runId, action: 'review asked for' })
    return true
  })
  if (!isNew) return { runId: await openRunOf(db, organisationId), isNew }
  if (await orderReview({ organisationId, askedBy: actor.userId, runId })) return { runId, isNew }
  await db.updateTable('reviewRun').set({ finishedAt: nowInstant(), error: 'The server was only just starting.' }).where('id', '=', runId).execute()
  throw problem(503, 'not-ready', 'The server is only just starting. Please try again in a few seconds.', { retryAfterSeconds: 5 })
}

async function openRunOf(db: Db, organisationId: string): Promise<string> {
  const row = await db.selectFrom('reviewRun').select('id').where('organisationId', '=', organisationId).where('askedBy', 'is not', null).orderBy('startedAt', 'desc').limit(1).executeTakeFirstOrThrow()
  return row.id
}
