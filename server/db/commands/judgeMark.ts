import type { MarkTrend } from '../../../shared/utils/movement/trend'
import { markTrend } from '../../../shared/utils/movement/trend'
import { trendOptionsFor } from '../../../shared/utils/movement/trendOptions'
import { widthClass } from '../../../shared/utils/movement/widthClass'
import { findMarkFindings, type JudgedReading, type MarkJudgement } from '../../../shared/utils/upkeep/findMarkFindings'
import { nextReading } from '../../../shared/utils/upkeep/readingPlan'
import type { MarkPlace, MarkShape, WallType } from '../../../shared/types/mark'
import type { Trx } from '../connect'
import { dayIn } from '../../utils/clock'
import { findLatestSurvey } from '../queries/attics'
import { findJudgedMark, findLastLoadChange, findReports, findSegmentReadings, type JudgedMark, type ReadingDetail } from '../queries/judging'
import type { RecordActor } from './appendRecord'
import { keepFindings } from './keepFindings'
import { lockUnit } from './lockUnit'
import { tellStaffAboutMark } from './tellStaff'
import { updateUnitStatus } from './updateUnitStatus'

const MM_PER_FT = 304.8

type Reports = Awaited<ReturnType<typeof findReports>>
type Readings = Awaited<ReturnType<typeof findSegmentReadings>>

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
  const [rows, reports] = [await findSegmentReadings(trx, mark.id, mark.segment), await findReports(trx, mark.id)]
  const judgement = await judgementOf(trx, mark, rows, reports)
  await storeJudgement(trx, mark, judgement, rows)
  const changes = await keepFindings(trx, scope, findMarkFindings(judgement))
  await tellStaffAboutMark(trx, { mark, reports, changes })
}

async function judgementOf(trx: Trx, mark: JudgedMark, rows: Readings, reports: Reports): Promise<MarkJudgement> {
  const today = dayIn(mark.timeZone)
  const settledOn = reports.flatMap(report => report.dangerSigns.length > 0 && report.correctedAt ? [dayIn(mark.timeZone, new Date(report.correctedAt))] : []).sort().at(-1)
  const readings = rows.flatMap((row): JudgedReading[] => {
    if (row.value === null || row.sigma === null) return []
    const { spanMm = null, dangerSigns = [] } = row.detail as ReadingDetail
    // Signs seen with a reading were looked at when a later danger report was settled.
    const standing = settledOn !== undefined && row.takenOn <= settledOn ? [] : dangerSigns
    return [{ takenOn: row.takenOn, value: row.value, sigma: row.sigma, spanMm, stain: row.stainState, dangerSigns: standing }]
  })
  const survey = mark.atticId ? await findLatestSurvey(trx, mark.atticId) : undefined
  const first = reports[0]
  const trend = trendOf(mark, readings, survey?.answers.framing ?? null, first?.answers.wallType ?? null)
  const lastEventOn = await findLastLoadChange(trx, mark.atticId)
  const sagSpanMm = reports.findLast(report => report.answers.sagSpanMm)?.answers.sagSpanMm
  const reportedOn = dayIn(mark.timeZone, new Date(mark.createdAt))
  const sides = [mark.lengthFt, mark.widthFt].filter(side => side !== null)
  return {
    mark: { id: mark.id, kind: mark.kind, shape: mark.shape as MarkShape | null, firstSeenOn: mark.firstSeenOn, reportedOn },
    today, readings, trend,
    dangerSigns: reports.filter(report => !report.correctedAt).flatMap(report => report.dangerSigns.map(sign => ({ sign, seenOn: dayIn(mark.timeZone, new Date(report.receivedAt)) }))),
    dangerClearedOn: null,
    stain: mark.stainState ? { state: mark.stainState, seenOn: dayIn(mark.timeZone, new Date(reports.at(-1)?.receivedAt ?? mark.createdAt)) } : null,
    loadAbove: mark.aboveLb === null ? null : { totalLb: mark.aboveLb, utilisation: mark.aboveUtilisation },
    ceilingSpanMm: sagSpanMm ?? (sides.length > 0 ? Math.min(...sides) * MM_PER_FT : null),
    morePops: mark.morePops,
    plaster: /plaster/i.test(mark.ceilingFinish),
    nextReading: nextReading({ reportedOn, activity: trend.activity, lastEventOn, closed: false }, rows, today),
  }
}

function trendOf(mark: JudgedMark, readings: JudgedReading[], framing: string | null, wallType: WallType | null): MarkTrend {
  return markTrend(readings, trendOptionsFor({ kind: mark.kind, place: mark.place as MarkPlace | null, wallType, framing }, mark))
}

async function storeJudgement(trx: Trx, mark: JudgedMark, { trend, readings, nextReading: next }: MarkJudgement, rows: Readings) {
  const last = readings.at(-1)
  await trx.updateTable('mark').set({
    activity: trend.activity,
    slopePerYear: trend.kind === 'measured' ? trend.slopePerYear : null,
    lastValue: last?.value ?? null,
    lastReadOn: rows.at(-1)?.takenOn ?? null,
    widthClass: mark.kind === 'crack' && last ? widthClass(last.value).class : null,
    nextReadingOn: next?.dueOn ?? null,
  }).where('id', '=', mark.id).execute()
}
