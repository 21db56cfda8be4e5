import { sql } from 'kysely'
import type { DueInput } from '../../../shared/utils/upkeep/dueItems'
import type { Db } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { findLastLoadChange } from './judging'

/** What the daily review reads of one unit. */

export const findReviewedUnit = (db: Db, unitId: string) =>
  db.selectFrom('unit as u').innerJoin('organisation as o', 'o.id', 'u.organisationId')
    .select(['u.id', 'u.organisationId', 'u.archivedAt', 'o.timeZone']).where('u.id', '=', unitId).executeTakeFirst()

export type ReviewedUnit = NonNullable<Awaited<ReturnType<typeof findReviewedUnit>>>

export const findUnitsAfter = (db: Db, organisationId: string, afterId: string | undefined, limit: number) =>
  db.selectFrom('unit').select('id').where('organisationId', '=', organisationId)
    .$if(afterId !== undefined, query => query.where('id', '>', afterId!)).orderBy('id').limit(limit).execute()

export const findOpenJobs = (db: Db, unitId: string) =>
  db.selectFrom('job').select(['id', 'title', 'dueOn', 'priority']).where('unitId', '=', unitId).where('state', 'in', ['planned', 'scheduled']).execute()

/** How many people of the tenancy of today can be written to; undefined where nobody lives. */
export async function findContacts(db: Db, unitId: string, today: string) {
  const tenancy = await db.selectFrom('tenancy').select('id').where('unitId', '=', unitId).where('startsOn', '<=', today)
    .where(eb => eb.or([eb('endsOn', 'is', null), eb('endsOn', '>=', today)])).executeTakeFirst()
  if (!tenancy) return undefined
  const people = await db.selectFrom('tenancyPerson as p').innerJoin('appUser as u', 'u.id', 'p.userId').select('u.mailRefusedAt').where('p.tenancyId', '=', tenancy.id).execute()
  const invited = await db.selectFrom('invitation').select('id').where('unitId', '=', unitId).where('role', '=', 'tenant')
    .where('acceptedAt', 'is', null).where('revokedAt', 'is', null).where('expiresAt', '>', nowInstant()).limit(1).execute()
  const refused = people.filter(person => person.mailRefusedAt !== null).length
  return { working: people.length - refused + invited.length, refused }
}

/** Everything of one unit that can fall due. */
export async function findDueInput(db: Db, unit: ReviewedUnit): Promise<DueInput> {
  const marks = await db.selectFrom('mark').select(['id', 'unitId', 'atticId', 'activity', 'createdAt', 'segment']).where('unitId', '=', unit.id).where('state', '!=', 'closed').execute()
  const readings = await db.selectFrom('reading').select(['markId', 'takenOn', 'segment']).where('unitId', '=', unit.id).execute()
  const attics = await findDueAttics(db, unit.id)
  const jobs = await findOpenJobs(db, unit.id)
  const lastEvents = new Map<string, string | null>()
  for (const attic of attics) lastEvents.set(attic.id, await findLastLoadChange(db, attic.id))
  return {
    marks: marks.map(mark => ({
      id: mark.id, unitId: unit.id, activity: mark.activity, closed: false,
      reportedOn: dayIn(unit.timeZone, new Date(mark.createdAt)), lastEventOn: mark.atticId ? lastEvents.get(mark.atticId) ?? null : null,
      readings: readings.filter(reading => reading.markId === mark.id && reading.segment === mark.segment),
    })),
    attics: attics.map(({ id, itemCount, confirmedOn, inspectedOn }) => ({ id, unitId: unit.id, itemCount, confirmedOn, inspectedOn })),
    jobs: jobs.map(({ id, dueOn }) => ({ id, dueOn, unitId: unit.id })),
    findings: [], invitations: [],
  }
}

const findDueAttics = (db: Db, unitId: string) =>
  db.selectFrom('attic as a').select([
    'a.id',
    sql<number>`(select count(*) from attic_item i where i.attic_id = a.id and i.removed_on is null)`.as('itemCount'),
    sql<string | null>`coalesce(a.inventory_confirmed_on, (select min(i.placed_on) from attic_item i where i.attic_id = a.id and i.removed_on is null))`.as('confirmedOn'),
    sql<string | null>`greatest((select max(s.surveyed_on) from attic_survey s where s.attic_id = a.id),
      (select max(d.written_on) from attic_document d where d.attic_id = a.id and d.kind = 'inspection-record' and d.withdrawn_at is null))`.as('inspectedOn'),
  ]).where('a.unitId', '=', unitId).where('a.archivedAt', 'is', null).execute()
