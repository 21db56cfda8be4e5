import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { AtticDocument } from '../../../shared/types/attic'
import type { AtticListRow, GuessRecord } from '../../../shared/types/atticDetail'
import type { Page } from '../../../shared/types/home'
import { visibleUnits, type Actor } from './actor'
import { judgedAnswers } from './surveys'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'

const latestSurvey = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('atticSurvey as s').select(['s.id', 's.surveyedOn', 's.ratedPsf', 's.onHold', 's.basis', judgedAnswers().as('answers')]).where('s.atticId', '=', atticId)
    .orderBy('s.createdAt', 'desc').orderBy('s.id', 'desc').limit(1))

/** The survey that holds now: the last one entered. */
export const findLatestSurvey = (db: Db, atticId: string) => latestSurvey.first(db, { atticId })

const surveysOf = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('atticSurvey as s').innerJoin('appUser as u', 'u.id', 's.surveyedBy')
    .select(['s.id', 's.surveyedOn', 's.ratedPsf', 's.onHold', 's.basis', judgedAnswers().as('answers'), 's.createdAt', 'u.name as surveyedByName'])
    .where('s.atticId', '=', atticId).orderBy('s.createdAt', 'desc').orderBy('s.id', 'desc').limit(50))

export const findSurveys = (db: Db, atticId: string) => surveysOf.rows(db, { atticId })

const itemsIn = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('atticItem').selectAll().where('atticId', '=', atticId).where('removedOn', 'is', null)
    .orderBy('createdAt').orderBy('id'))

export const findItemsIn = (db: Db, atticId: string) => itemsIn.rows(db, { atticId })

const documentsOf = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('atticDocument').selectAll().where('atticId', '=', atticId).where('withdrawnAt', 'is', null).orderBy('createdAt'))

export const findDocuments = (db: Db, atticId: string) => documentsOf.rows(db, { atticId })

type DocumentRow = Awaited<ReturnType<typeof findDocuments>>[number]

export const asAtticDocument = (row: DocumentRow): AtticDocument => ({
  kind: row.kind, writtenOn: row.writtenOn, writtenBy: row.writtenBy, attached: true, ratedPsf: row.ratedPsf,
  liftsHold: row.liftsHold, acceptsStrongbacks: row.acceptsStrongbacks, coversWholeAttic: row.coversWholeAttic, area: row.area,
})

/** What stood in the attic after each step, by the day it happened: a step entered late counts from its own day. */
export const runningTotalLb = sql<number>`sum(e.delta_lb) over (partition by e.attic_id order by e.happened_on, e.recorded_at, e.id)`

const loadEventsOf = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('loadEvent as e').innerJoin('atticItem as i', 'i.id', 'e.itemId').innerJoin('appUser as u', 'u.id', 'e.recordedBy')
    .select(['e.id', 'e.kind', 'e.happenedOn', 'e.deltaLb', runningTotalLb.as('totalAfterLb'), 'e.recordedAt', 'i.name as itemName', 'u.name as recordedByName'])
    .where('e.atticId', '=', atticId).orderBy('e.happenedOn', 'desc').orderBy('e.recordedAt', 'desc').orderBy('e.id', 'desc').limit(500))

/** The load history, newest first. */
export const findLoadEvents = (db: Db, atticId: string) => loadEventsOf.rows(db, { atticId })

const itemPhotosIn = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('photo as p').innerJoin('atticItem as i', 'i.id', 'p.itemId').select(['p.id', 'p.itemId', 'p.uploadedAt'])
    .where('i.atticId', '=', atticId).where('i.removedOn', 'is', null).orderBy('p.uploadedAt').limit(500))

export const findItemPhotos = (db: Db, atticId: string) => itemPhotosIn.rows(db, { atticId })

const weighedByPerson = compiledOnce((db, { organisationId, userId }: { organisationId: string, userId: string }) =>
  db.selectFrom('loadEvent as e')
    .select([sql<number>`count(*)`.as('count'), sql<number | null>`percentile_cont(0.5) within group (order by (e.detail->>'toLb')::float8 / (e.detail->>'fromLb')::float8)`.as('medianRatio')])
    .where('e.organisationId', '=', organisationId).where('e.recordedBy', '=', userId).where('e.kind', '=', 'reweighed')
    .where(sql<boolean>`e.detail->>'weightSource' = 'weighed' and coalesce(e.detail->>'fromSource', 'estimate') <> 'weighed' and (e.detail->>'fromLb')::float8 > 0`))

/** How a person's earlier weights compared with the scale: weighed over noted, in the middle of all. */
export async function findGuessRecord(db: Db, { organisationId, userId }: Pick<Actor, 'organisationId' | 'userId'>): Promise<GuessRecord> {
  return await weighedByPerson.first(db, { organisationId, userId }) ?? { count: 0, medianRatio: null }
}

export async function sumStoredLb(db: Db, atticId: string): Promise<number> {
  const row = await db.selectFrom('atticItem').select(sql<string | null>`sum(quantity * typical_lb)`.as('lb'))
    .where('atticId', '=', atticId).where('removedOn', 'is', null).executeTakeFirstOrThrow()
  return Number(row.lb ?? 0)
}

export interface AtticListFilter { search?: string, after?: string, limit: number }

/** The attics the asker may see by name, with their home and the latest survey; keyset-paged on (name, id). */
export async function listAttics(db: Db, actor: Actor, { search, after, limit }: AtticListFilter): Promise<Page<AtticListRow>> {
  const from = readCursor(after, ['text', 'id'])
  const visible = visibleUnits(actor)
  const pattern = search ? likeAnywhere(search) : undefined
  const rows = await db.selectFrom('attic as a')
    .innerJoin('unit as u', 'u.id', 'a.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
    .leftJoinLateral(eb => eb.selectFrom('atticSurvey as s').select('s.surveyedOn')
      .whereRef('s.atticId', '=', 'a.id').orderBy('s.createdAt', 'desc').orderBy('s.id', 'desc').limit(1).as('latest'), join => join.onTrue())
    .leftJoinLateral(eb => eb.selectFrom('atticItem as i').select(i => [sql<number>`coalesce(sum(i.quantity * i.typical_lb), 0)`.as('storedLb'), i.fn.countAll<number>().as('itemCount')])
      .whereRef('i.atticId', '=', 'a.id').where('i.removedOn', 'is', null).as('stored'), join => join.onTrue())
    .leftJoin('atticStatus as now', 'now.atticId', 'a.id')
    .select(['a.id', 'a.name', 'a.unitId', 'u.name as unitName', 'p.name as propertyName', 'a.inventoryConfirmedOn', 'latest.surveyedOn',
      'now.ratedPsf', 'now.loadState', 'now.utilisation', sql<number>`stored.stored_lb`.as('storedLb'), sql<number>`stored.item_count`.as('itemCount')])
    .where('a.organisationId', '=', actor.organisationId).where('a.archivedAt', 'is', null)
    .$if(visible !== 'all', query => query.where(eb => eb('a.unitId', '=', eb.fn.any(eb.val(visible as string[])))))
    .$if(pattern !== undefined, query => query.where(eb => eb.or([eb('a.name', 'ilike', pattern!), eb('u.name', 'ilike', pattern!), eb('p.name', 'ilike', pattern!)])))
    .$if(from !== undefined, query => query.where(sql<boolean>`(a.name, a.id) > (${from![0]}, ${from![1]}::uuid)`))
    .orderBy('a.name').orderBy('a.id').limit(limit + 1).execute()
  return pageOf(rows, limit, row => [row.name, row.id])
}
