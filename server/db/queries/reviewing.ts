import { sql } from 'kysely'
import { groupByKey } from '../../../shared/utils/groupByKey'
import type { Db } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { findJudgedMarks, findLastLoadChanges, findMarkSources, type JudgedMark, type MarkSources } from './judging'
import { judgedAnswers } from './surveys'

/** What the daily review reads, for many units at a time: a fixed number of statements however many there are. */

const reviewedUnits = (db: Db) => db.selectFrom('unit as u').innerJoin('organisation as o', 'o.id', 'u.organisationId')
  .select(['u.id', 'u.organisationId', 'u.archivedAt', 'o.timeZone'])

export const findReviewedUnit = (db: Db, unitId: string) => reviewedUnits(db).where('u.id', '=', unitId).executeTakeFirst()

export type ReviewedUnit = NonNullable<Awaited<ReturnType<typeof findReviewedUnit>>>

export const findUnitsAfter = (db: Db, organisationId: string, afterId: string | undefined, limit: number) =>
  db.selectFrom('unit').select('id').where('organisationId', '=', organisationId)
    .$if(afterId !== undefined, query => query.where('id', '>', afterId!)).orderBy('id').limit(limit).execute()

export const findOpenJobs = (db: Db, unitIds: readonly string[]) =>
  db.selectFrom('job').select(['id', 'unitId', 'title', 'dueOn', 'priority']).where('unitId', '=', sql<string>`any(${unitIds}::uuid[])`).where('state', 'in', ['planned', 'scheduled']).execute()

export type OpenJob = Awaited<ReturnType<typeof findOpenJobs>>[number]

export interface Contacts { unitId: string, working: number, refused: number }

/** How many people of the tenancy of today can be written to; somebody invited and not yet come counts. Nothing for homes where nobody lives. */
export async function findContacts(db: Db, unitIds: readonly string[], today: string): Promise<Map<string, Contacts>> {
  const { rows } = await sql<Contacts>`
    select t.unit_id, count(w.id) filter (where w.mail_refused_at is null)
        + (exists (select from invitation i where i.unit_id = t.unit_id and i.organisation_id = t.organisation_id and i.role = 'tenant'
            and i.accepted_at is null and i.revoked_at is null and i.expires_at > ${nowInstant()}))::int as working,
      count(w.id) filter (where w.mail_refused_at is not null) as refused
    from tenancy t left join tenancy_person p on p.tenancy_id = t.id left join app_user w on w.id = p.user_id
    where t.unit_id = any(${unitIds}::uuid[]) and t.starts_on <= ${today} and (t.ends_on is null or t.ends_on >= ${today})
    group by t.unit_id, t.organisation_id`.execute(db)
  return new Map(rows.map(row => [row.unitId, row]))
}

async function findAttics(db: Db, unitIds: readonly string[]) {
  const attics = await db.selectFrom('attic as a').innerJoin('organisation as o', 'o.id', 'a.organisationId').leftJoin('atticStatus as s', 's.atticId', 'a.id')
    .select(['a.id', 'a.organisationId', 'a.unitId', 'a.name', 'a.archivedAt', 'a.inventoryConfirmedOn', 'o.timeZone', 's.loadState', 's.utilisation', 's.storedLb', 's.ratedPsf'])
    .where('a.unitId', '=', sql<string>`any(${unitIds}::uuid[])`).orderBy('a.id').execute()
  const of = sql<string>`any(${attics.map(attic => attic.id)}::uuid[])`
  const surveys = await db.selectFrom('atticSurvey as s').distinctOn('s.atticId').select(['s.atticId', judgedAnswers().as('answers'), 's.surveyedOn'])
    .select(sql<string>`max(surveyed_on) over (partition by attic_id)`.as('newestOn')).where('s.atticId', '=', of).orderBy('s.atticId').orderBy('s.createdAt', 'desc').orderBy('s.id', 'desc').execute()
  const documents = groupByKey(await db.selectFrom('atticDocument').selectAll().where('atticId', '=', of).where('withdrawnAt', 'is', null).orderBy('createdAt').execute(), row => row.atticId)
  const items = groupByKey(await db.selectFrom('atticItem').selectAll().where('atticId', '=', of).where('removedOn', 'is', null).orderBy('createdAt').orderBy('id').execute(), row => row.atticId)
  const loadChanges = await findLastLoadChanges(db, attics.map(attic => attic.id))
  return attics.map(({ loadState, utilisation, storedLb, ratedPsf, ...attic }) => ({
    attic, kept: loadState === null ? null : { loadState, utilisation, storedLb: storedLb!, ratedPsf },
    survey: surveys.find(survey => survey.atticId === attic.id), documents: documents.get(attic.id) ?? [], items: items.get(attic.id) ?? [],
    lastLoadChangeOn: loadChanges.get(attic.id) ?? null,
  }))
}

export type AtticUnderReview = Awaited<ReturnType<typeof findAttics>>[number]

export interface MarkUnderReview { mark: JudgedMark, sources: MarkSources }

async function findMarks(db: Db, markIds: string[]): Promise<MarkUnderReview[]> {
  const marks = await findJudgedMarks(db, markIds)
  const sources = new Map((await findMarkSources(db, markIds)).map(source => [source.markId, source]))
  return marks.map(mark => ({ mark, sources: sources.get(mark.id)! }))
}

const findOpenFindings = (db: Db, unitIds: readonly string[]) =>
  db.selectFrom('finding').selectAll().where('unitId', '=', sql<string>`any(${unitIds}::uuid[])`).where('clearedAt', 'is', null).orderBy('openedAt').orderBy('id').execute()

const findOpenDue = (db: Db, organisationId: string, unitIds: readonly string[]) =>
  db.selectFrom('dueItem').select(['id', 'unitId', 'kind', 'subjectId']).where('organisationId', '=', organisationId).where('settledAt', 'is', null)
    .where('unitId', '=', sql<string>`any(${unitIds}::uuid[])`).execute()

export interface UnitUnderReview {
  unit: ReviewedUnit
  attics: AtticUnderReview[]
  marks: MarkUnderReview[]
  findings: Awaited<ReturnType<typeof findOpenFindings>>
  jobs: OpenJob[]
  contacts: Contacts | undefined
  due: Awaited<ReturnType<typeof findOpenDue>>
}

/** Ids of the marks that are followed; to write, those somebody is editing this moment are left to their own change. */
const findFollowedMarkIds = (db: Db, unitIds: readonly string[], toWrite: boolean) =>
  db.selectFrom('mark').select('id').where('unitId', '=', sql<string>`any(${unitIds}::uuid[])`).where('state', '!=', 'closed').orderBy('id')
    .$if(toWrite, query => query.forNoKeyUpdate().skipLocked()).execute()

/** Units of one organisation with everything they are judged from. */
export async function findUnitsUnderReview(db: Db, organisationId: string, unitIds: readonly string[], { toWrite }: { toWrite: boolean }): Promise<UnitUnderReview[]> {
  const units = await reviewedUnits(db).where('u.id', '=', sql<string>`any(${unitIds}::uuid[])`).orderBy('u.id').execute()
  const first = units[0]
  if (!first) return []
  const attics = groupByKey(await findAttics(db, unitIds), ({ attic }) => attic.unitId)
  const marks = groupByKey(await findMarks(db, (await findFollowedMarkIds(db, unitIds, toWrite)).map(mark => mark.id)), ({ mark }) => mark.unitId)
  const findings = groupByKey(await findOpenFindings(db, unitIds), row => row.unitId)
  const jobs = groupByKey(await findOpenJobs(db, unitIds), job => job.unitId)
  const contacts = await findContacts(db, unitIds, dayIn(first.timeZone))
  const due = groupByKey(await findOpenDue(db, organisationId, unitIds), item => item.unitId)
  return units.map(unit => ({
    unit, attics: attics.get(unit.id) ?? [], marks: marks.get(unit.id) ?? [], findings: findings.get(unit.id) ?? [], jobs: jobs.get(unit.id) ?? [],
    contacts: contacts.get(unit.id), due: due.get(unit.id) ?? [],
  }))
}
