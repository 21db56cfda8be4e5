import type { ReplayedAlarm } from '../../types/hindsight'
import type { MovementLimits } from '../../types/limits'
import { daysBetween } from '../days'
import type { TrendReading } from './series'
import { seriesOf } from './series'
import { suddenRises } from './sudden'
import { activeFromOn } from './trend'
import { trendOptionsFor, type MarkSetting } from './trendOptions'

export interface ReplayedMark {
  id: string
  setting: MarkSetting
  readings: readonly (TrendReading & { segment: number })[]
}

/** Ours: a jump stands as one finding for a month, so jumps closer together are one alarm. */
const ONE_ALARM_DAYS = 30

interface Alarm { rule: ReplayedAlarm['rule'], on: string }

function alarmsOf(readings: readonly TrendReading[], setting: MarkSetting, limits: MovementLimits): Alarm[] {
  const options = trendOptionsFor(setting, limits)
  const jumps: string[] = []
  for (const { takenOn } of suddenRises(seriesOf(readings), options.leastJump, options.jumpSigmas)) {
    const last = jumps.at(-1)
    if (last === undefined || daysBetween(last, takenOn) > ONE_ALARM_DAYS) jumps.push(takenOn)
  }
  const sudden = jumps.map(on => ({ rule: 'mark-sudden' as const, on }))
  // Counts of pops have their own rule, which looks at the number alone.
  const activeOn = setting.kind === 'nail-pops' ? null : activeFromOn(readings, options)
  const rule = setting.kind === 'sag' ? 'sag-growing' as const : 'mark-active' as const
  return activeOn === null ? sudden : [...sudden, { rule, on: activeOn }]
}

function changeOf(nowOn: string | null, thenOn: string | null): ReplayedAlarm['change'] {
  if (nowOn === null) return 'new'
  if (thenOn === null) return 'gone'
  return nowOn === thenOn ? 'same' : thenOn < nowOn ? 'sooner' : 'later'
}

/** Alarms are the same one when rule and day agree; the one active alarm of a segment also when only the day differs. */
function paired(now: Alarm[], then: Alarm[]): Pick<ReplayedAlarm, 'rule' | 'nowOn' | 'thenOn'>[] {
  const isSame = (a: Alarm) => (b: Alarm) => a.rule === b.rule && (a.rule !== 'mark-sudden' || a.on === b.on)
  return [
    ...now.map(alarm => ({ rule: alarm.rule, nowOn: alarm.on, thenOn: then.find(isSame(alarm))?.on ?? null })),
    ...then.filter(alarm => !now.some(isSame(alarm))).map(alarm => ({ rule: alarm.rule, nowOn: null, thenOn: alarm.on })),
  ]
}

/**
 * Walks a mark's readings through twice, with the limits in force and with others, as if each reading had been judged on its
 * day: which alarms would have been raised. Of the activity rule the first alarm of each segment counts.
 */
export function replayLimits(mark: ReplayedMark, now: MovementLimits, then: MovementLimits): ReplayedAlarm[] {
  const segments = [...new Set(mark.readings.map(reading => reading.segment))].sort((a, b) => a - b)
  return segments.flatMap((segment) => {
    const readings = mark.readings.filter(reading => reading.segment === segment)
    return paired(alarmsOf(readings, mark.setting, now), alarmsOf(readings, mark.setting, then))
      .map(pair => ({ markId: mark.id, segment, ...pair, change: changeOf(pair.nowOn, pair.thenOn) }))
  })
}
