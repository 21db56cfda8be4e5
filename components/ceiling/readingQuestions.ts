import type { MarkKind } from '#shared/types/mark'
import type { ReadingRow } from '#shared/types/markPage'
import { daysBetween } from '#shared/utils/days'
import { valueToAskAgain } from '#shared/utils/movement/askAgain'

export interface SizeQuestion {
  value: number
  usual: number
  /** What was probably meant, when a point was forgotten: 1.2 for 12. */
  meant: number | null
}

/** Whether a number is to be asked about, with the readings of the segment so far. */
export function sizeQuestion(kind: MarkKind, value: number | null, readings: readonly ReadingRow[], segment: number): SizeQuestion | null {
  if (value === null || !Number.isFinite(value)) return null
  const earlier = readings.flatMap(reading => reading.segment === segment && reading.value !== null ? [reading.value] : [])
  const usual = valueToAskAgain(kind, value, earlier)
  if (usual === null) return null
  const tenth = Number((value / 10).toFixed(4))
  return { value, usual, meant: kind !== 'nail-pops' && valueToAskAgain(kind, tenth, earlier) === null && tenth <= usual * 3 ? tenth : null }
}

/** Ours, as on the server: a day's difference is a matter of time zones and midnight. */
const DAYS_APART = 1

/** The day a camera wrote into a photo, when it is another than the one given. */
export function cameraDayApart(cameraTimes: readonly (string | null)[], takenOn: string): string | null {
  return cameraTimes.flatMap(time => time ? [time.slice(0, 10)] : []).find(on => Math.abs(daysBetween(on, takenOn)) > DAYS_APART) ?? null
}

/** The phone's own day, when its clock is off from the server's. */
export function phoneDayApart(phone: Date, today: string): string | null {
  const on = `${phone.getFullYear()}-${String(phone.getMonth() + 1).padStart(2, '0')}-${String(phone.getDate()).padStart(2, '0')}`
  return Math.abs(daysBetween(on, today)) > DAYS_APART ? on : null
}
