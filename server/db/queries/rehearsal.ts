import { sql } from 'kysely'
import { setImmediate as breathe } from 'node:timers/promises'
import type { HindsightOutcome, LimitsRehearsalAnswer, RehearsedAlarm, ReplayedAlarm } from '../../../shared/types/hindsight'
import type { MovementLimits } from '../../../shared/types/limits'
import type { MarkKind, MarkPlace, WallType } from '../../../shared/types/mark'
import { daysBetween } from '../../../shared/utils/days'
import { groupByKey } from '../../../shared/utils/groupByKey'
import { replayLimits } from '../../../shared/utils/movement/replayLimits'
import type { Db } from '../connect'
import { dayIn } from '../../utils/clock'
import type { Actor } from './actor'
import { findLimits, limitsOf } from './limits'

/** Ours: so many marks are walked through in one answer, those with judged findings first. */
const MOST_MARKS = 600
const MARKS_AT_ONCE = 40
const MOST_CHANGES = 200
/** Ours: a stored finding belongs to the replayed alarm of its rule that is nearest in time, within this. */
const SAME_ALARM_DAYS = 60

async function findReplayedMarks(db: Db, organisationId: string) {
  const rows = await db.selectFrom('mark as m').innerJoin('unit as u', 'u.id', 'm.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
    .select([
      'm.id', 'm.number', 'm.label', 'm.kind', 'm.place', 'u.name as unitName', 'p.name as propertyName',
      sql<string | null>`(select s.answers ->> 'framing' from attic_survey s where s.attic_id = m.attic_id order by s.created_at desc, s.id desc limit 1)`.as('framing'),
      sql<WallType | null>`(select o.answers ->> 'wallType' from observation o where o.mark_id = m.id order by o.received_at limit 1)`.as('wallType'),
      sql<boolean>`exists (select from finding f join finding_hindsight h on h.finding_id = f.id where f.subject_id = m.id)`.as('isJudged'),
    ])
    .where('m.organisationId', '=', organisationId).where('m.lastReadOn', 'is not', null)
    .orderBy('isJudged', 'desc').orderBy('m.lastReadOn', 'desc').orderBy('m.id').limit(MOST_MARKS).execute()
  return rows.map(({ kind, place, framing, wallType, ...mark }) => ({ ...mark, setting: { kind: kind as MarkKind, place: place as MarkPlace | null, framing, wallType } }))
}

type ReplayedMarkRow = Awaited<ReturnType<typeof findReplayedMarks>>[number]

const findReadings = (db: Db, markIds: string[]) =>
  db.selectFrom('reading').select(['markId', 'takenOn', 'segment', sql<number>`value`.as('value'), sql<number>`sigma`.as('sigma')])
    .where('markId', 'in', markIds).where('value', 'is not', null).orderBy('markId').orderBy('takenOn').orderBy('receivedAt').execute()

interface KnownFinding { id: string, subjectId: string, rule: string, openedOn: string, outcome: HindsightOutcome | null }

async function findMovementFindings(db: Db, markIds: string[], timeZone: string): Promise<KnownFinding[]> {
  const rows = await db.selectFrom('finding as f')
    .select(['f.id', 'f.subjectId', 'f.rule', 'f.openedAt', sql<HindsightOutcome | null>`(select h.outcome from finding_hindsight h where h.finding_id = f.id order by h.judged_at desc, h.id desc limit 1)`.as('outcome')])
    .where('f.subjectId', 'in', markIds).where('f.rule', 'in', ['mark-active', 'mark-sudden', 'sag-growing']).execute()
  return rows.map(({ openedAt, ...row }) => ({ ...row, openedOn: dayIn(timeZone, new Date(openedAt)) }))
}

function findingOf(alarm: ReplayedAlarm, known: KnownFinding[]): KnownFinding | undefined {
  const on = alarm.nowOn ?? alarm.thenOn!
  const apart = (finding: KnownFinding) => Math.abs(daysBetween(on, finding.openedOn))
  return known.filter(finding => finding.subjectId === alarm.markId && finding.rule === alarm.rule && apart(finding) <= SAME_ALARM_DAYS).sort((a, b) => apart(a) - apart(b))[0]
}

async function replayBatch(db: Db, actor: Actor, marks: ReplayedMarkRow[], now: MovementLimits, then: MovementLimits): Promise<RehearsedAlarm[]> {
  const ids = marks.map(mark => mark.id)
  const readings = groupByKey(await findReadings(db, ids), reading => reading.markId)
  const findings = await findMovementFindings(db, ids, actor.timeZone)
  return marks.flatMap(mark => replayLimits({ ...mark, readings: readings.get(mark.id) ?? [] }, now, then).map((alarm) => {
    const finding = findingOf(alarm, findings)
    return { ...alarm, markNumber: mark.number, markLabel: mark.label, unitName: mark.unitName, propertyName: mark.propertyName, findingId: finding?.id ?? null, outcome: finding?.outcome ?? null }
  }))
}

const dayOf = (alarm: RehearsedAlarm) => alarm.thenOn ?? alarm.nowOn ?? ''

/** What the organisation's readings would have raised under other limits. Reads only. */
export async function rehearseLimits(db: Db, actor: Actor, then: MovementLimits): Promise<LimitsRehearsalAnswer> {
  const now = limitsOf(await findLimits(db, actor.organisationId))
  const marks = await findReplayedMarks(db, actor.organisationId)
  const { n } = await db.selectFrom('mark').select(eb => eb.fn.countAll<number>().as('n')).where('organisationId', '=', actor.organisationId).where('lastReadOn', 'is not', null).executeTakeFirstOrThrow()
  const alarms: RehearsedAlarm[] = []
  for (let from = 0; from < marks.length; from += MARKS_AT_ONCE) {
    alarms.push(...await replayBatch(db, actor, marks.slice(from, from + MARKS_AT_ONCE), now, then))
    await breathe()
  }
  const count = (test: (alarm: RehearsedAlarm) => boolean) => alarms.filter(test).length
  return {
    marks: marks.length, marksLeftOut: n - marks.length,
    alarmsNow: count(alarm => alarm.nowOn !== null), alarmsThen: count(alarm => alarm.thenOn !== null),
    judged: {
      rightKept: count(alarm => alarm.outcome === 'right' && alarm.thenOn !== null), rightLost: count(alarm => alarm.outcome === 'right' && alarm.thenOn === null),
      wrongKept: count(alarm => alarm.outcome === 'wrong' && alarm.thenOn !== null), wrongSpared: count(alarm => alarm.outcome === 'wrong' && alarm.thenOn === null),
    },
    changes: alarms.filter(alarm => alarm.change !== 'same').sort((a, b) => dayOf(b).localeCompare(dayOf(a))).slice(0, MOST_CHANGES),
  }
}
