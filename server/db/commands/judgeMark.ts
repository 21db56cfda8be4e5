import type { Selectable } from 'kysely'
import type { MarkPlace, MarkShape, WallType } from '../../../shared/types/mark'
import { markTrend, type MarkTrend } from '../../../shared/utils/movement/trend'
import { trendOptionsFor } from '../../../shared/utils/movement/trendOptions'
import { widthClass } from '../../../shared/utils/movement/widthClass'
import { findMarkFindings, type JudgedReading, type MarkJudgement } from '../../../shared/utils/upkeep/findMarkFindings'
import { nextReading } from '../../../shared/utils/upkeep/readingPlan'
import type { Trx } from '../connect'
import type { MarkTable } from '../schema/ceilings'
import { dayIn } from '../../utils/clock'
import { findLatestSurvey } from '../queries/attics'
import { findJudgedMark, findLastLoadChanges, findMarkSources, type JudgedMark, type JudgedReport, type SegmentReading } from '../queries/judging'
import type { RecordActor } from './appendRecord'
import { keepFindings } from './keepFindings'
import { lockUnit } from './lockUnit'
import { tellStaffAboutMark } from './tellStaff'
import { updateUnitStatus } from './updateUnitStatus'

const MM_PER_FT = 304.8

/** What a mark is judged from besides itself. */
export interface MarkMaterial {
  readings: readonly SegmentReading[]
  reports: readonly JudgedReport[]
  /** Of the attic above. */
  framing: string | null
  lastLoadChangeOn: string | null
}

/**
 * Judges a mark anew from all readings of its segment, the danger signs that stand and the load above: trend, activity,
 * width class and next reading on the mark, findings kept, urgent mail queued, the unit's summary refreshed.
 */
export async function judgeMark(trx: Trx, _actor: RecordActor, markId: string): Promise<void> {
  const mark = await findJudgedMark(trx, markId)
  if (!mark) return
  await lockUnit(trx, mark.organisationId, mark.unitId)
  await judgeLockedMark(trx, mark)
  await updateUnitStatus(trx, mark.unitId)
}

/** The same for callers that hold the unit's lock and refresh its summary themselves. */
export async function judgeLockedMark(trx: Trx, mark: JudgedMark): Promise<void> {
  const scope = { organisationId: mark.organisationId, unitId: mark.unitId, subjectKinds: ['mark' as const], subjectId: mark.id }
  if (mark.state === 'closed') {
    await trx.updateTable('mark').set({ nextReadingOn: null }).where('id', '=', mark.id).execute()
    await keepFindings(trx, scope, [])
    return
  }
  const material = await findMaterial(trx, mark)
  const judgement = markJudgement(mark, material, dayIn(mark.timeZone))
  const status = markStatus(mark, judgement, material)
  if (!isMarkStatus(mark, status)) await trx.updateTable('mark').set(status).where('id', '=', mark.id).execute()
  const changes = await keepFindings(trx, scope, findMarkFindings(judgement))
  await tellStaffAboutMark(trx, { mark, reports: material.reports, changes })
}

async function findMaterial(trx: Trx, mark: JudgedMark): Promise<MarkMaterial> {
  const [sources] = await findMarkSources(trx, [mark.id])
  const survey = mark.atticId ? await findLatestSurvey(trx, mark.atticId) : undefined
  const changes = await findLastLoadChanges(trx, mark.atticId ? [mark.atticId] : [])
  return { readings: sources!.readings, reports: sources!.reports, framing: survey?.answers.framing ?? null, lastLoadChangeOn: changes.get(mark.atticId ?? '') ?? null }
}

/** What the rules read of a mark today. */
export function markJudgement(mark: JudgedMark, { readings: rows, reports, framing, lastLoadChangeOn }: MarkMaterial, today: string): MarkJudgement {
  const settledOn = reports.flatMap(report => report.dangerSigns.length > 0 && report.correctedAt ? [dayIn(mark.timeZone, new Date(report.correctedAt))] : []).sort().at(-1)
  const readings = rows.flatMap(({ value, sigma, takenOn, spanMm, stainState, dangerSigns }): JudgedReading[] => {
    if (value === null || sigma === null) return []
    // Signs seen with a reading were looked at when a later danger report was settled.
    const standing = settledOn !== undefined && takenOn <= settledOn ? [] : dangerSigns ?? []
    return [{ takenOn, value, sigma, spanMm, stain: stainState, dangerSigns: standing }]
  })
  const trend = trendOf(mark, readings, framing, reports[0]?.wallType ?? null)
  const reportedOn = dayIn(mark.timeZone, new Date(mark.createdAt))
  const sides = [mark.lengthFt, mark.widthFt].filter(side => side !== null)
  return {
    mark: { id: mark.id, kind: mark.kind, shape: mark.shape as MarkShape | null, firstSeenOn: mark.firstSeenOn, reportedOn },
    today, readings, trend,
    dangerSigns: reports.filter(report => !report.correctedAt).flatMap(report => report.dangerSigns.map(sign => ({ sign, seenOn: dayIn(mark.timeZone, new Date(report.receivedAt)) }))),
    dangerClearedOn: null,
    stain: mark.stainState ? { state: mark.stainState, seenOn: dayIn(mark.timeZone, new Date(reports.at(-1)?.receivedAt ?? mark.createdAt)) } : null,
    loadAbove: mark.aboveLb === null ? null : { totalLb: mark.aboveLb, utilisation: mark.aboveUtilisation },
    ceilingSpanMm: reports.findLast(report => report.sagSpanMm)?.sagSpanMm ?? (sides.length > 0 ? Math.min(...sides) * MM_PER_FT : null),
    morePops: mark.morePops,
    plaster: /plaster/i.test(mark.ceilingFinish),
    nextReading: nextReading({ reportedOn, activity: trend.activity, lastEventOn: lastLoadChangeOn, inTrial: mark.inTrial, closed: false }, rows, today),
  }
}

function trendOf(mark: JudgedMark, readings: JudgedReading[], framing: string | null, wallType: WallType | null): MarkTrend {
  return markTrend(readings, trendOptionsFor({ kind: mark.kind, place: mark.place as MarkPlace | null, wallType, framing }, mark))
}

export type MarkStatus = Pick<Selectable<MarkTable>, 'activity' | 'slopePerYear' | 'lastValue' | 'lastReadOn' | 'widthClass' | 'nextReadingOn'>

/** What the mark's row keeps of a judgement. */
export function markStatus(mark: JudgedMark, { trend, readings, nextReading: next }: MarkJudgement, { readings: rows }: MarkMaterial): MarkStatus {
  const last = readings.at(-1)
  return {
    activity: trend.activity,
    slopePerYear: trend.kind === 'measured' ? trend.slopePerYear : null,
    lastValue: last?.value ?? null,
    lastReadOn: rows.at(-1)?.takenOn ?? null,
    widthClass: mark.kind === 'crack' && last ? widthClass(last.value).class : null,
    nextReadingOn: next?.dueOn ?? null,
  }
}

/** Whether the row says so already. */
export const isMarkStatus = (mark: JudgedMark, status: MarkStatus): boolean =>
  (Object.keys(status) as (keyof MarkStatus)[]).every(name => mark[name] === status[name])
