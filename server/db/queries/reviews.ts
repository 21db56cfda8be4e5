import { sql } from 'kysely'
import type { ReviewRun, Reviews } from '../../../shared/types/review'
import { addDays } from '../../../shared/utils/days'
import type { Db } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import type { Actor } from './actor'

/** Organisations whose review hour of today, in their own time zone, has come and whose run of today is not done. */
export function findOrganisationsToReview(db: Db): Promise<{ organisationId: string, today: string }[]> {
  const at = sql`${nowInstant()}::timestamptz at time zone o.time_zone`
  return db.selectFrom('organisation as o')
    .select(['o.id as organisationId', sql<string>`(${at})::date`.as('today')])
    .where(sql<boolean>`extract(hour from ${at}) >= o.review_hour`)
    .where(sql<boolean>`not exists (select from review_run r where r.organisation_id = o.id and r.asked_by is null and r.reviewed_on = (${at})::date and r.finished_at is not null)`)
    .orderBy('o.id').execute()
}

const listReviewRuns = (db: Db, organisationId: string, limit: number): Promise<ReviewRun[]> =>
  db.selectFrom('reviewRun as r').leftJoin('appUser as u', 'u.id', 'r.askedBy')
    .select(['r.id', 'r.reviewedOn', 'u.name as askedByName', 'r.startedAt', 'r.finishedAt', 'r.counts', 'r.error'])
    .where('r.organisationId', '=', organisationId).orderBy('r.startedAt', 'desc').limit(limit).$castTo<ReviewRun>().execute()

/** Past runs, latest first, and when the next comes by itself. */
export async function findReviews(db: Db, actor: Actor): Promise<Reviews> {
  const runs = await listReviewRuns(db, actor.organisationId, 30)
  const { reviewHour: hour, timeZone } = await db.selectFrom('organisation').select(['reviewHour', 'timeZone']).where('id', '=', actor.organisationId).executeTakeFirstOrThrow()
  const today = dayIn(timeZone)
  const isDone = runs.some(run => run.askedByName === null && run.reviewedOn === today && run.finishedAt !== null)
  return { runs, next: { on: isDone ? addDays(today, 1) : today, hour, timeZone } }
}
