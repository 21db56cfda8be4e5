import type { Activity } from '../../types/mark'
import { addDays, dayNumber, daysBetween } from '../days'

/** All ours. */
export const READING_PLAN_DAYS = { first: 7, second: 14, monthly: 30, active: 7, trial: 14, dormant: 91 } as const
/** After a storm or a change of load above, silence this long raises the home in the list. */
const SILENCE_DAYS = 7

export interface PlannedMark {
  /** The day the mark was first reported. */
  reportedOn: string
  activity: Activity
  /** The day of the last storm or load change above, if any. */
  lastEventOn: string | null
  /** Watched in an unload trial that is planned or under way: its two sides want readings. */
  inTrial?: boolean
  /** A mark that has been closed needs no more readings. */
  closed: boolean
}

export type ReadingDueReason = 'new-mark' | 'second-reading' | 'monthly' | 'active-weekly' | 'trial-fortnightly' | 'dormant-quarterly'

export interface NextReading {
  dueOn: string
  reason: ReadingDueReason
  /** Zero until the due day has passed. */
  daysLate: number
  /** Raised when nobody has read the mark since a storm or load change. */
  priority: 'usual' | 'raised'
}

function reasonOf({ activity, inTrial }: PlannedMark, readingDays: number): ReadingDueReason {
  if (activity === 'active') return 'active-weekly'
  if (readingDays <= 1) return 'new-mark'
  if (readingDays === 2) return 'second-reading'
  if (inTrial) return 'trial-fortnightly'
  return activity === 'dormant' ? 'dormant-quarterly' : 'monthly'
}

const DAYS_BY_REASON: Record<ReadingDueReason, number> = {
  'new-mark': READING_PLAN_DAYS.first,
  'second-reading': READING_PLAN_DAYS.second,
  'monthly': READING_PLAN_DAYS.monthly,
  'active-weekly': READING_PLAN_DAYS.active,
  'trial-fortnightly': READING_PLAN_DAYS.trial,
  'dormant-quarterly': READING_PLAN_DAYS.dormant,
}

/**
 * When a mark is to be read next: 7 days after a new mark or its first reading, 14 after the second, then monthly;
 * weekly while active, every two weeks in an unload trial, quarterly while dormant. Readings dated after today are left out. No answer (null) once closed.
 */
export function nextReading(mark: PlannedMark, readings: readonly { takenOn: string }[], today: string): NextReading | null {
  if (mark.closed) return null
  const now = dayNumber(today)
  const days = [...new Set(readings.map(reading => reading.takenOn))].filter(on => dayNumber(on) <= now).sort()
  const lastOn = days.at(-1) ?? mark.reportedOn
  const reason = reasonOf(mark, days.length)
  const dueOn = addDays(lastOn, DAYS_BY_REASON[reason])
  const silent = mark.lastEventOn !== null && mark.lastEventOn > lastOn && daysBetween(mark.lastEventOn, today) >= SILENCE_DAYS
  return { dueOn, reason, daysLate: Math.max(0, daysBetween(dueOn, today)), priority: silent ? 'raised' : 'usual' }
}

export function nextReadingDueOn(mark: PlannedMark, readings: readonly { takenOn: string }[], today: string): string | null {
  return nextReading(mark, readings, today)?.dueOn ?? null
}
