const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** '2027-03-14' → '14 Mar 2027'. Null when it is no day of the calendar. */
export function dayText(day: string): string | null {
  const match = /^(\d{4})-(\d{2})-(\d{2})$/.exec(day)
  if (!match) return null
  const [year, month, date] = [Number(match[1]), Number(match[2]), Number(match[3])]
  const lastDate = new Date(Date.UTC(year, month, 0)).getUTCDate()
  if (month < 1 || month > 12 || date < 1 || date > lastDate) return null
  return `${date} ${months[month - 1]} ${year}`
}

/**
 * An instant as a day in a time zone, with the time of day when asked: '14 Mar 2027, 14:08'.
 * Server and browser must write the same, so the zone is never the machine's own.
 */
export function instantText(instant: Date, options: { timeZone?: string, withTime?: boolean } = {}): string | null {
  if (Number.isNaN(instant.getTime())) return null
  const parts = new Intl.DateTimeFormat('en-CA', {
    timeZone: options.timeZone ?? 'UTC', hourCycle: 'h23',
    year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit',
  }).formatToParts(instant)
  const part = (type: Intl.DateTimeFormatPartTypes) => parts.find(p => p.type === type)?.value ?? ''
  const day = dayText(`${part('year')}-${part('month')}-${part('day')}`)
  if (!options.withTime || day === null) return day
  return `${day}, ${part('hour')}:${part('minute')}${options.timeZone ? '' : ' UTC'}`
}
