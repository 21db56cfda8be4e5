import type { Expression, SqlBool } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { KeepClearCause, KeepClearNotice, NoticesOfUnit, NoticeView, OpenCause } from '../../../shared/types/notice'
import { abilitiesOf, reachOf } from '../../utils/policy'
import { notFound } from '../../utils/problems'
import type { Actor } from './actor'

const rows = (db: Db) => db.selectFrom('keepClearNotice as n')
  .innerJoin('room as r', 'r.id', 'n.roomId').innerJoin('unit as u', 'u.id', 'n.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
  .innerJoin('organisation as o', 'o.id', 'n.organisationId')
  .innerJoin('appUser as raiser', 'raiser.id', 'n.raisedBy').leftJoin('appUser as lifter', 'lifter.id', 'n.liftedBy')
  .select(['n.id', 'n.unitId', 'u.name as unitName', 'p.name as propertyName', 'n.roomId', 'r.name as roomName', 'n.cause', 'n.atticId', 'n.findingId',
    'n.area', 'n.waitingFor', 'n.raisedAt', 'raiser.name as raisedByName', 'n.liftedAt', 'lifter.name as liftedByName', 'n.liftedReason'])

/** Open ones, and the last lifted ones. */
const noticesOf = compiledOnce((db, { unitId }: { unitId: string }) =>
  rows(db).where('n.unitId', '=', unitId).orderBy(eb => eb('n.liftedAt', 'is not', null)).orderBy('n.raisedAt', 'desc').orderBy('n.id').limit(100))

const noticeRow = compiledOnce((db, { id }: { id: string }) =>
  rows(db).select(['o.name as organisationName', 'o.contactPhone as phone', 'o.timeZone']).where('n.id', '=', id))

const atticCause: Partial<Record<string, KeepClearCause>> = { over: 'attic-over', hold: 'attic-on-hold' }

type Scope = { unitId: string } | { atticId: string } | { findingId: string }

/** Attics of a home that are over or on hold now. */
async function atticCauses(db: Db, scope: Scope): Promise<OpenCause[]> {
  if ('findingId' in scope) return []
  const found = await db.selectFrom('atticStatus as s').innerJoin('attic as a', 'a.id', 's.atticId').select(['a.id', 'a.name', 's.loadState'])
    .where('s.loadState', 'in', ['over', 'hold']).where('a.archivedAt', 'is', null)
    .$if('unitId' in scope, query => query.where('a.unitId', '=', (scope as { unitId: string }).unitId))
    .$if('atticId' in scope, query => query.where('a.id', '=', (scope as { atticId: string }).atticId))
    .orderBy('a.name').execute()
  return found.map(({ id, name, loadState }) => ({ cause: atticCause[loadState]!, atticId: id, findingId: null, roomId: null, label: name }))
}

/** Open findings about a ceiling whose advice is to leave the room. */
async function ceilingCauses(db: Db, scope: Scope): Promise<OpenCause[]> {
  if ('atticId' in scope) return []
  const found = await db.selectFrom('finding as f').innerJoin('mark as m', 'm.id', 'f.subjectId').select(['f.id', 'm.roomId', 'm.label'])
    .where('f.subjectKind', '=', 'mark').where('f.adviceCode', '=', 'leave-room-and-call').where('f.clearedAt', 'is', null)
    .where((eb): Expression<SqlBool> => 'unitId' in scope ? eb('f.unitId', '=', scope.unitId) : eb('f.id', '=', scope.findingId))
    .orderBy('f.openedAt').execute()
  return found.map(({ id, roomId, label }) => ({ cause: 'danger-sign', atticId: null, findingId: id, roomId, label }))
}

/** What a notice may be raised for now. */
export async function findOpenCauses(db: Db, scope: Scope): Promise<OpenCause[]> {
  return [...await ceilingCauses(db, scope), ...await atticCauses(db, scope)]
}

export async function findNoticesOfUnit(db: Db, actor: Actor, unitId: string): Promise<NoticesOfUnit> {
  const raises = reachOf(actor.role, 'raise notice') !== undefined
  const [notices, causes, rooms, organisation] = await Promise.all([
    noticesOf.rows(db, { unitId }),
    raises ? findOpenCauses(db, { unitId }) : [],
    raises ? db.selectFrom('room').select(['id', 'name']).where('unitId', '=', unitId).where('archivedAt', 'is', null).orderBy('sort').orderBy('id').execute() : [],
    db.selectFrom('organisation').select('contactPhone').where('id', '=', actor.organisationId).executeTakeFirstOrThrow(),
  ])
  return { open: notices.filter(notice => !notice.liftedAt), lifted: notices.filter(notice => notice.liftedAt), causes, rooms, contactPhone: organisation.contactPhone }
}

export async function findNoticeView(db: Db, actor: Actor, id: string): Promise<NoticeView> {
  const row = await noticeRow.first(db, { id })
  if (!row) throw notFound()
  const { organisationName, phone, timeZone, ...notice } = row
  return { ...notice, timeZone, contact: { organisationName, phone }, isCauseOpen: await isCauseOpen(db, notice), abilities: abilitiesOf(actor.role) }
}

async function isCauseOpen(db: Db, { atticId, findingId }: Pick<KeepClearNotice, 'atticId' | 'findingId'>): Promise<boolean> {
  const causes = await findOpenCauses(db, findingId ? { findingId } : { atticId: atticId! })
  return causes.length > 0
}
