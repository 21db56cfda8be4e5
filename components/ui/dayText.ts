import type { InjectionKey, MaybeRef } from 'vue'
import { clockInZone } from '~/shared/utils/dayInZone'
import { formatDay, isDay } from '~/shared/utils/days'

/** The time zone of the organisation, provided once by the frame around the page. */
export const timeZoneKey: InjectionKey<MaybeRef<string | undefined>> = Symbol('time zone')

/**
 * An instant as a day in a time zone, with the time of day when asked: '14 Mar 2027, 14:08'.
 * Server and browser must write the same, so the zone is never the machine's own. Null when it is no instant.
 */
export function instantText(instant: Date, options: { timeZone?: string, withTime?: boolean } = {}): string | null {
  if (Number.isNaN(instant.getTime())) return null
  const { day, time } = clockInZone(options.timeZone ?? 'UTC', instant)
  return options.withTime ? `${formatDay(day)}, ${time}${options.timeZone ? '' : ' UTC'}` : formatDay(day)
}

/** A day or an instant in words, with the form a machine reads; null when it is neither. */
export function timeText(value: string | Date, options: { timeZone?: string, withTime?: boolean } = {}): { text: string, machine: string } | null {
  if (typeof value === 'string' && isDay(value)) return { text: formatDay(value), machine: value }
  const instant = new Date(value)
  const text = instantText(instant, options)
  return text === null ? null : { text, machine: instant.toISOString() }
}
