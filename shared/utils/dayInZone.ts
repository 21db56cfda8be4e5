/** Making a formatter takes a hundred times as long as using it; there are a few hundred zones at most. */
const formats = new Map<string, Intl.DateTimeFormat>()

function formatFor(timeZone: string): Intl.DateTimeFormat {
  const kept = formats.get(timeZone)
  if (kept) return kept
  const made = new Intl.DateTimeFormat('en-CA', { timeZone, hourCycle: 'h23', year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit' })
  formats.set(timeZone, made)
  return made
}

/** The calendar day 'YYYY-MM-DD' and the time of day 'HH:MM' at an instant in an IANA time zone. Throws RangeError for no instant or zone. */
export function clockInZone(timeZone: string, at: Date): { day: string, time: string } {
  const part: Partial<Record<Intl.DateTimeFormatPartTypes, string>> = {}
  for (const { type, value } of formatFor(timeZone).formatToParts(at)) part[type] = value
  const { year = '', month = '', day = '', hour = '', minute = '' } = part
  return { day: `${year.padStart(4, '0')}-${month}-${day}`, time: `${hour}:${minute}` }
}

export const dayInZone = (timeZone: string, at: Date): string => clockInZone(timeZone, at).day
