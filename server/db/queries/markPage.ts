import type { Db } from '../connect'
import type { Actor } from './actor'
import type { MarkFacts, MarkPage, ReadingRow } from '../../../shared/types/markPage'
import type { WallType } from '../../../shared/types/mark'
import { cluesFor } from '../../../shared/utils/movement/causeClues'
import { loadLinks } from '../../../shared/utils/movement/loadLink'
import type { TrendReading } from '../../../shared/utils/movement/series'
import { markTrend, type MarkTrend } from '../../../shared/utils/movement/trend'
import { trendOptionsFor } from '../../../shared/utils/movement/trendOptions'
import { dayIn } from '../../utils/clock'
import { notFound } from '../../utils/problems'
import { abilitiesOf } from '../../utils/policy'
import { findLatestSurvey } from './attics'
import { findMarkFacts, findMarkSurroundings, listJobsOfMark, listLoadSteps, listRoomsOf } from './marks'
import { listCeilingMarks, listJoinings, listMarkDeeds } from './markJoinings'
import { listPhotosOfMark } from './photos'
import { listReadings } from './readings'
import { listRepairs } from './repairs'
import { listReportsOfMark } from './observations'

type Surroundings = NonNullable<Awaited<ReturnType<typeof findMarkSurroundings>>>

/** Everything a mark's page shows; a fixed number of statements whatever it holds. */
export async function findMarkPage(db: Db, actor: Actor, markId: string): Promise<MarkPage> {
  const [mark, around] = await Promise.all([findMarkFacts(db, markId), findMarkSurroundings(db, markId)])
  if (!mark || !around) throw notFound()
  const [readings, reports, photos, jobs, rooms, loadSteps, survey, repairs, deeds, joinings, ceilingMarks] = await Promise.all([
    listReadings(db, markId), listReportsOfMark(db, markId), listPhotosOfMark(db, markId), listJobsOfMark(db, markId), listRoomsOf(db, mark.unitId),
    mark.atticId ? listLoadSteps(db, mark.atticId) : [], mark.atticId ? findLatestSurvey(db, mark.atticId) : undefined,
    listRepairs(db, markId), listMarkDeeds(db, markId), listJoinings(db, markId), listCeilingMarks(db, mark.unitId),
  ])
  const first = reports.at(-1)?.answers
  const wallType = first?.wallType ?? null
  const points = measuredIn(readings, mark.segment)
  const trend = trendOf(mark, around, points, wallType, survey?.answers.framing ?? null)
  return {
    mark, readings, trend, loadSteps, reports, photos, jobs, rooms, repairs, deeds, ...joinings, ceilingMarks,
    room: { id: around.roomId, name: around.roomName, lengthFt: around.lengthFt, widthFt: around.widthFt },
    unit: { id: around.unitId, name: around.unitName },
    property: { id: around.propertyId, name: around.propertyName, yearBuilt: around.yearBuilt },
    attic: around.atticId && around.atticName !== null ? { id: around.atticId, name: around.atticName } : null,
    loadLinks: loadLinks(points, loadSteps),
    clues: cluesFor({
      kind: mark.kind, place: mark.place, shape: mark.shape, wallType, recentEvents: first?.recentEvents ?? [],
      mendedBefore: mark.segment > 1, widestOnDayOfYear: trend.kind === 'measured' && trend.season?.isClear ? trend.season.highestOnDayOfYear : null,
    }),
    abilities: abilitiesOf(actor.role), today: dayIn(around.timeZone), timeZone: around.timeZone, contactPhone: around.contactPhone,
  }
}

const measuredIn = (readings: ReadingRow[], segment: number): TrendReading[] =>
  readings.flatMap(({ segment: own, takenOn, value, sigma }) => own === segment && value !== null && sigma !== null ? [{ takenOn, value, sigma }] : [])

function trendOf(mark: MarkFacts, around: Surroundings, points: TrendReading[], wallType: WallType | null, framing: string | null): MarkTrend {
  return markTrend(points, trendOptionsFor({ kind: mark.kind, place: mark.place, wallType, framing }, around))
}
