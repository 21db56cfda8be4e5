import type { AtticItem } from '../../../shared/types/item'
import type { DangerSign, ObservationAnswers } from '../../../shared/types/mark'
import type { UnitsOfMeasure } from '../../../shared/types/people'
import type { Db } from '../connect'
import type { findItemsIn } from './attics'
import { limitColumns } from './limits'

/** What a judgement reads. Rows become the shapes the calculations know. */

type ItemRow = Awaited<ReturnType<typeof findItemsIn>>[number]

export const asAtticItem = (row: ItemRow): AtticItem => ({
  id: row.id, atticId: row.atticId, catalogueKey: row.catalogueKey, label: row.name, category: row.category, count: row.quantity,
  lowLb: row.lowLb, typicalLb: row.typicalLb, highLb: row.highLb, weightSource: row.weightSource,
  lengthFt: row.lengthFt, widthFt: row.widthFt, heightFt: row.heightFt,
  placement: { fieldId: String(row.fieldNumber), xFt: row.xFt, yFt: row.yFt },
  owner: row.belongsTo, addedOn: row.placedOn, removedOn: row.removedOn, note: row.notes || null,
})

export const findJudgedAttic = (db: Db, atticId: string) =>
  db.selectFrom('attic as a').innerJoin('organisation as o', 'o.id', 'a.organisationId')
    .select(['a.id', 'a.organisationId', 'a.unitId', 'a.name', 'a.archivedAt', 'a.inventoryConfirmedOn', 'o.timeZone'])
    .where('a.id', '=', atticId).executeTakeFirst()

/** A mark with its room, its organisation's settings, and how the attic above was last judged. */
export const findJudgedMark = (db: Db, markId: string) =>
  db.selectFrom('mark as m').innerJoin('organisation as o', 'o.id', 'm.organisationId').innerJoin('room as r', 'r.id', 'm.roomId')
    .leftJoin('atticStatus as s', 's.atticId', 'm.atticId')
    .selectAll('m')
    .select([...limitColumns, 'o.timeZone', 'r.name as roomName', 'r.ceilingFinish', 'r.lengthFt', 'r.widthFt', 's.storedLb as aboveLb', 's.utilisation as aboveUtilisation'])
    .where('m.id', '=', markId).executeTakeFirst()

export type JudgedMark = NonNullable<Awaited<ReturnType<typeof findJudgedMark>>>

export interface ReadingDetail { spanMm?: number | null, dangerSigns?: DangerSign[] }

export const findSegmentReadings = (db: Db, markId: string, segment: number) =>
  db.selectFrom('reading').select(['takenOn', 'value', 'sigma', 'stainState', 'detail', 'receivedAt'])
    .where('markId', '=', markId).where('segment', '=', segment).orderBy('takenOn').orderBy('receivedAt').execute()

export async function findReports(db: Db, markId: string) {
  const rows = await db.selectFrom('observation').select(['id', 'number', 'answers', 'dangerSigns', 'receivedAt', 'correctedAt', 'reportedBy'])
    .where('markId', '=', markId).orderBy('receivedAt').execute()
  return rows.map(row => ({ ...row, answers: row.answers as Partial<ObservationAnswers>, dangerSigns: row.dangerSigns as DangerSign[] }))
}

/** Ours: a change of load above smaller than this is no event for a ceiling (calculations §6 uses the same for the load link). */
const LOAD_EVENT_LB = 50

export async function findLastLoadChange(db: Db, atticId: string | null): Promise<string | null> {
  if (!atticId) return null
  const row = await db.selectFrom('loadEvent').select(eb => eb.fn.max('happenedOn').as('on'))
    .where('atticId', '=', atticId).where(eb => eb.or([eb('deltaLb', '>=', LOAD_EVENT_LB), eb('deltaLb', '<=', -LOAD_EVENT_LB)])).executeTakeFirst()
  return row?.on ?? null
}

export interface StaffMember { userId: string, name: string, email: string, role: 'owner' | 'manager', unitsOfMeasure: UnitsOfMeasure, digest: boolean }

/** Who decides in an organisation. */
export const findStaff = (db: Db, organisationId: string): Promise<StaffMember[]> =>
  db.selectFrom('membership as m').innerJoin('appUser as u', 'u.id', 'm.userId')
    .select(['m.userId', 'u.name', 'u.email', 'm.role', 'u.unitsOfMeasure', 'm.digest']).where('m.organisationId', '=', organisationId)
    .where('m.endedAt', 'is', null).where('m.role', 'in', ['owner', 'manager']).orderBy('m.createdAt').$castTo<StaffMember>().execute()

export const findUnitPlace = (db: Db, unitId: string) =>
  db.selectFrom('unit as u').innerJoin('property as p', 'p.id', 'u.propertyId')
    .innerJoin('organisation as o', 'o.id', 'u.organisationId')
    .select(['u.id', 'u.organisationId', 'u.name as unitName', 'p.name as propertyName', 'o.name as organisationName', 'p.yearBuilt']).where('u.id', '=', unitId).executeTakeFirstOrThrow()
