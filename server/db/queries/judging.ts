import type { AtticItem } from '../../../shared/types/item'
import { sql } from 'kysely'
import type { DangerSign, StainState, WallType } from '../../../shared/types/mark'
import type { UnitsOfMeasure } from '../../../shared/types/people'
import type { Db } from '../connect'
import type { findItemsIn } from './attics'
import { isoInstant } from './jsonList'
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

/** Marks with their room, their organisation's settings, and how the attic above was last judged. */
const fromJudgedMarks = (db: Db) =>
  db.selectFrom('mark as m').innerJoin('organisation as o', 'o.id', 'm.organisationId').innerJoin('room as r', 'r.id', 'm.roomId')
    .leftJoin('atticStatus as s', 's.atticId', 'm.atticId')
    .selectAll('m')
    .select([...limitColumns, 'o.timeZone', 'r.name as roomName', 'r.ceilingFinish', 'r.lengthFt', 'r.widthFt', 's.storedLb as aboveLb', 's.utilisation as aboveUtilisation'])
    .select(sql<boolean>`exists (select from unload_trial_mark w join unload_trial t on t.id = w.trial_id where w.mark_id = m.id and t.state in ('planned', 'unloaded'))`.as('inTrial'))

export const findJudgedMark = (db: Db, markId: string) => fromJudgedMarks(db).where('m.id', '=', markId).executeTakeFirst()

export const findJudgedMarks = (db: Db, markIds: readonly string[]) =>
  fromJudgedMarks(db).where(eb => eb('m.id', '=', eb.fn.any(eb.val(markIds as string[])))).orderBy('m.id').execute()

export type JudgedMark = NonNullable<Awaited<ReturnType<typeof findJudgedMark>>>

/** One reading of a mark's present segment as the rules read it. */
export interface SegmentReading {
  takenOn: string
  value: number | null
  sigma: number | null
  stainState: StainState | null
  spanMm: number | null
  dangerSigns: DangerSign[] | null
}

/** What somebody reported about a mark, as far as judging asks. */
export interface JudgedReport {
  number: number
  wallType: WallType | null
  sagSpanMm: number | null
  dangerSigns: DangerSign[]
  receivedAt: string
  correctedAt: string | null
  reportedBy: string
}

export interface MarkSources { markId: string, readings: SegmentReading[], reports: JudgedReport[] }

/** As lists of values: most of a review's reading, and without names a third of the size. */
type ReadingValues = [takenOn: string, value: number | null, sigma: number | null, stainState: StainState | null, spanMm: number | null, dangerSigns: DangerSign[] | null]

/** Readings of the present segment and reports of marks, oldest first: two lists a mark. */
export async function findMarkSources(db: Db, markIds: readonly string[]): Promise<MarkSources[]> {
  const { rows } = await sql<{ markId: string, readings: ReadingValues[], reports: JudgedReport[] }>`
    select m.id as mark_id,
      (select coalesce(json_agg(json_build_array(r.taken_on, r.value, r.sigma, r.stain_state, r.detail -> 'spanMm', r.detail -> 'dangerSigns') order by r.taken_on, r.received_at), '[]')
        from reading r where r.mark_id = m.id and r.segment = m.segment) as readings,
      (select coalesce(json_agg(json_build_object('number', o.number, 'wallType', o.answers -> 'wallType', 'sagSpanMm', o.answers -> 'sagSpanMm', 'dangerSigns', o.danger_signs,
          'receivedAt', ${isoInstant(sql<string>`o.received_at`)}, 'correctedAt', ${isoInstant(sql<string | null>`o.corrected_at`)}, 'reportedBy', o.reported_by) order by o.received_at), '[]')
        from observation o where o.mark_id = m.id) as reports
    from mark m where m.id = any(${markIds}::uuid[])`.execute(db)
  return rows.map(({ markId, readings, reports }) => ({
    markId, reports,
    readings: readings.map(([takenOn, value, sigma, stainState, spanMm, dangerSigns]) => ({ takenOn, value, sigma, stainState, spanMm, dangerSigns })),
  }))
}

/** Ours: a change of load above smaller than this is no event for a ceiling (calculations §6 uses the same for the load link). */
const LOAD_EVENT_LB = 50

/** The last day the load of each attic changed by enough to matter to a ceiling. */
export async function findLastLoadChanges(db: Db, atticIds: readonly string[]): Promise<Map<string, string>> {
  const { rows } = await sql<{ atticId: string, on: string }>`select attic_id, max(happened_on) as "on" from load_event
    where attic_id = any(${atticIds}::uuid[]) and abs(delta_lb) >= ${LOAD_EVENT_LB} group by attic_id`.execute(db)
  return new Map(rows.map(row => [row.atticId, row.on]))
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
