/** Days are 'YYYY-MM-DD' strings; arithmetic is done on whole days counted from 1 Jan 1970, so no clock or time zone enters. */

const MS_PER_DAY = 86_400_000
const SHAPE = /^(\d{4})-(\d{2})-(\d{2})$/

/** True for a day that exists in the calendar, written 'YYYY-MM-DD'. */
export function isDay(on: string): boolean {
  const parts = SHAPE.exec(on)
  if (!parts) return false
  const date = new Date(`${on}T00:00:00Z`)
  return !Number.isNaN(date.getTime()) && date.toISOString().slice(0, 10) === on
}

/** Whole days since 1 Jan 1970. Throws RangeError for anything that is not a day. */
export function dayNumber(on: string): number {
  if (!isDay(on)) throw new RangeError(`Not a day: ${JSON.stringify(on)}`)
  return Date.parse(`${on}T00:00:00Z`) / MS_PER_DAY
}

export function dayFromNumber(day: number): string {
  return new Date(day * MS_PER_DAY).toISOString().slice(0, 10)
}

export function addDays(on: string, days: number): string {
  return dayFromNumber(dayNumber(on) + Math.round(days))
}

/** Same day of the month, or the month's last day where there is none. */
export function addMonths(on: string, months: number): string {
  dayNumber(on)
  const [year = 0, month = 1, day = 1] = on.split('-').map(Number)
  const first = new Date(Date.UTC(year, month - 1 + months, 1))
  const daysInMonth = new Date(Date.UTC(first.getUTCFullYear(), first.getUTCMonth() + 1, 0)).getUTCDate()
  first.setUTCDate(Math.min(day, daysInMonth))
  return first.toISOString().slice(0, 10)
}

/** Days from the first to the second; negative when the second is earlier. */
export function daysBetween(fromOn: string, toOn: string): number {
  return dayNumber(toOn) - dayNumber(fromOn)
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const

/** '14 Mar 2027', held together by no-break spaces so that it never wraps. */
export function formatDay(on: string): string {
  dayNumber(on)
  const [year = '', month = '1', day = '1'] = on.split('-')
  return `${Number(day)}\u00A0${MONTHS[Number(month) - 1]}\u00A0${year}`
}
