/** Days are 'YYYY-MM-DD' strings; arithmetic is done on whole days counted from 1 Jan 1970, so no clock or time zone enters. */

const MS_PER_DAY = 86_400_000
const SHAPE = /^\d{4}-\d{2}-\d{2}$/
const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]

const isLeapYear = (year: number) => year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0)

/** Counted, not parsed: a trend asks this of every reading. Undefined for anything that is no day of the calendar. */
function countDays(on: string): number | undefined {
  if (!SHAPE.test(on)) return undefined
  const year = Number(on.slice(0, 4))
  const month = Number(on.slice(5, 7))
  const day = Number(on.slice(8))
  const leap = isLeapYear(year) ? 1 : 0
  if (month < 1 || month > 12 || day < 1 || day > MONTH_DAYS[month - 1]! + (month === 2 ? leap : 0)) return undefined
  // Years run from March, so that the leap day is the last one; 719,468 days lie before 1 Jan 1970.
  const shifted = month > 2 ? year : year - 1
  const fromMarch = Math.floor((153 * ((month + 9) % 12) + 2) / 5) + day - 1
  return 365 * shifted + Math.floor(shifted / 4) - Math.floor(shifted / 100) + Math.floor(shifted / 400) + fromMarch - 719_468
}

/** True for a day that exists in the calendar, written 'YYYY-MM-DD'. */
export function isDay(on: string): boolean {
  return countDays(on) !== undefined
}

/** Whole days since 1 Jan 1970. Throws RangeError for anything that is not a day. */
export function dayNumber(on: string): number {
  const days = countDays(on)
  if (days === undefined) throw new RangeError(`Not a day: ${JSON.stringify(on)}`)
  return days
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
