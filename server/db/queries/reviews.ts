import { sql } from 'kysely'
import type { Db } from '../connect'
import { nowInstant } from '../../utils/clock'

/** Organisations whose review hour of today, in their own time zone, has come and whose run of today is not done. */
export function findOrganisationsToReview(db: Db): Promise<{ organisationId: string, today: string }[]> {
  const at = sql`${nowInstant()}::timestamptz at time zone o.time_zone`
  return db.selectFrom('organisation as o')
    .select(['o.id as organisationId', sql<string>`(${at})::date`.as('today')])
    .where(sql<boolean>`extract(hour from ${at}) >= o.review_hour`)
    .where(sql<boolean>`not exists (select from review_run r where r.organisation_id = o.id and r.asked_by is null and r.reviewed_on = (${at})::date and r.finished_at is not null)`)
    .orderBy('o.id').execute()
}

export interface ReviewRunRow {
  id: string
  reviewedOn: string
  askedByName: string | null
  startedAt: string
  finishedAt: string | null
  counts: Partial<Record<string, number>>
  error: string | null
}

export const listReviewRuns = (db: Db, organisationId: string, limit: number): Promise<ReviewRunRow[]> =>
  db.selectFrom('reviewRun as r').leftJoin('appUser as u', 'u.id', 'r.askedBy')
    .select(['r.id', 'r.reviewedOn', 'u.name as askedByName', 'r.startedAt', 'r.finishedAt', 'r.counts', 'r.error'])
    .where('r.organisationId', '=', organisationId).orderBy('r.startedAt', 'desc').limit(limit).$castTo<ReviewRunRow>().execute()
