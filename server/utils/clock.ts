import { dayInZone } from '../../shared/utils/dayInZone'

/**
 * The only place that reads the time. LATHKEY_CLOCK_OFFSET_MS moves it for tests and rehearsals;
 * nothing else in the server may call Date.now() or new Date() without an argument.
 */
export function now(): Date {
  return new Date(Date.now() + Number(process.env.LATHKEY_CLOCK_OFFSET_MS ?? 0))
}

export function nowInstant(): string {
  return now().toISOString()
}

/** The calendar day 'YYYY-MM-DD' at an instant in an IANA time zone. */
export function dayIn(timeZone: string, at: Date = now()): string {
  return dayInZone(timeZone, at)
}
