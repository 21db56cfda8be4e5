import { sql } from 'kysely'
import type { z } from 'zod'
import type { JobsQuery } from '../../../shared/schemas/job'
import type { Page } from '../../../shared/types/home'
import type { JobChoices, JobEventRow, JobRow, JobView } from '../../../shared/types/job'
import { jobMovesFor } from '../../../shared/utils/upkeep/jobStates'
import type { Db } from '../connect'
import { dayIn } from '../../utils/clock'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'
import { abilitiesOf, reachOf } from '../../utils/policy'
import type { Actor } from './actor'

const LIMIT = 50
const OPEN = ['planned', 'scheduled'] as const
const OVER = ['done', 'confirmed', 'cancelled'] as const

const fromJobs = (db: Db) =>
  db.selectFrom('job as j').innerJoin('unit as u', 'u.id', 'j.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
    .leftJoin('appUser as w', 'w.id', 'j.assigneeUserId')
    .select(['j.id', 'j.number', 'j.title', 'j.priority', 'j.state', 'j.unitId', 'u.name as unitName', 'p.name as propertyName', 'w.name as assigneeName',
      'j.scheduledOn', 'j.dueOn', 'j.doneOn', 'j.costCents', 'j.version'])

/** Money is the business of those who manage or do the job, not of the tenant. */
const maySeeCost = (actor: Actor) => reachOf(actor.role, 'do job') !== undefined

/** Jobs within the asker's reach: what is open, soonest due first; what is over, latest first. Keyset-paged. */
export async function listJobs(db: Db, actor: Actor, { list, unit, search, after }: z.output<typeof JobsQuery>): Promise<Page<JobRow>> {
  const from = readCursor(after, ['text', 'id'])
  const reach = reachOf(actor.role, 'see job')
  const isForward = list === 'open' || list === 'late'
  const rows = await fromJobs(db).where('j.organisationId', '=', actor.organisationId)
    .$if(reach === 'assigned', query => query.where('j.assigneeUserId', '=', actor.userId))
    .$if(reach === 'own units', query => query.where('j.unitId', '=', sql<string>`any(${actor.unitIds}::uuid[])`))
    .$if(isForward, query => query.where('j.state', 'in', OPEN))
    .$if(list === 'done', query => query.where('j.state', 'in', OVER))
    .$if(list === 'late', query => query.where('j.dueOn', '<', dayIn(actor.timeZone)))
    .$if(unit !== undefined, query => query.where('j.unitId', '=', unit!))
    .$if(Boolean(search), query => query.where(sql<boolean>`(j.number::text || ' ' || j.title || ' ' || p.name || ' ' || u.name) ilike ${likeAnywhere(search!)}`))
    .$if(from !== undefined, query => query.where(isForward
      ? sql<boolean>`(j.due_on, j.id) > (${from![0]}::date, ${from![1]}::uuid)`
      : sql<boolean>`(j.due_on, j.id) < (${from![0]}::date, ${from![1]}::uuid)`))
    .orderBy('j.dueOn', isForward ? 'asc' : 'desc').orderBy('j.id', isForward ? 'asc' : 'desc').limit(LIMIT + 1).execute()
  const page = pageOf(rows, LIMIT, row => [row.dueOn, row.id])
  return { ...page, rows: page.rows.map(row => maySeeCost(actor) ? row : { ...row, costCents: null }) }
}

export async function findJobView(db: Db, actor: Actor, jobId: string): Promise<JobView> {
  const row = await fromJobs(db).leftJoin('mark as m', 'm.id', 'j.markId').leftJoin('attic as a', 'a.id', 'j.atticId')
    .leftJoin('finding as f', 'f.id', 'j.findingId').innerJoin('organisation as o', 'o.id', 'j.organisationId')
    .select(['j.description', 'j.outcome', 'j.findingId', 'j.markId', 'j.atticId', 'j.assigneeUserId', 'j.createdAt', 'p.addressLines', 'p.yearBuilt', 'u.accessNotes',
      'm.label as markLabel', 'a.name as atticName', 'f.rule as findingRule', 'o.contactPhone'])
    .where('j.id', '=', jobId).executeTakeFirstOrThrow()
  const manages = reachOf(actor.role, 'edit job') !== undefined
  const does = maySeeCost(actor)
  return {
    ...row,
    ...(does ? {} : { costCents: null, accessNotes: null, findingId: null, findingRule: null }),
    moves: does ? jobMovesFor(row.state, manages) : [],
    history: does ? await listJobHistory(db, jobId) : [],
    abilities: abilitiesOf(actor.role),
  }
}

const listJobHistory = (db: Db, jobId: string): Promise<JobEventRow[]> =>
  db.selectFrom('recordEntry').select(['id', 'recordedAt', 'actorName', 'action', 'before', 'after'])
    .where('subjectId', '=', jobId).where('subjectKind', '=', 'job').orderBy('seq', 'desc').limit(100).$castTo<JobEventRow>().execute()

/** Who may be given a job in this organisation. */
export const findAssignee = (db: Db, organisationId: string, userId: string) =>
  db.selectFrom('membership as m').innerJoin('appUser as u', 'u.id', 'm.userId').select(['m.userId', 'u.name', 'u.email'])
    .where('m.organisationId', '=', organisationId).where('m.userId', '=', userId).where('m.endedAt', 'is', null).where('m.role', 'in', ['trades', 'manager', 'owner']).executeTakeFirst()

/** What the form of a job offers. Longer than this a list of homes is no longer read: start from the home instead. */
const MOST_CHOICES = 500

export async function findJobChoices(db: Db, actor: Actor): Promise<JobChoices> {
  const units = await db.selectFrom('unit as u').innerJoin('property as p', 'p.id', 'u.propertyId').select(['u.id', 'u.name', 'p.name as propertyName'])
    .where('u.organisationId', '=', actor.organisationId).where('u.archivedAt', 'is', null).orderBy('p.name').orderBy('u.name').orderBy('u.id').limit(MOST_CHOICES).execute()
  const assignees = await db.selectFrom('membership as m').innerJoin('appUser as w', 'w.id', 'm.userId').select(['m.userId', 'w.name', 'm.role'])
    .where('m.organisationId', '=', actor.organisationId).where('m.endedAt', 'is', null).where('m.role', 'in', ['trades', 'manager', 'owner'])
    .orderBy(sql`m.role = 'trades' desc`).orderBy('w.name').orderBy('m.id').limit(MOST_CHOICES).execute()
  return { units, assignees }
}
