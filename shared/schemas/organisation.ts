import { z } from 'zod'
import { shortText, version } from './fields'

const isTimeZone = (zone: string) => {
  // Offsets such as +02:00 pass Intl but not PostgreSQL, and know no summer time.
  if (!/^[A-Za-z_]+(\/[A-Za-z0-9_+-]+)*$/.test(zone)) return false
  try { return new Intl.DateTimeFormat('en-US', { timeZone: zone }).resolvedOptions().timeZone.length > 0 }
  catch { return false }
}

const whole = (what: string, min: number, max: number) =>
  z.int({ error: `Please give ${what} as a whole number.` }).min(min, `From ${min} to ${max}, please.`).max(max, `From ${min} to ${max}, please.`)

export const OrganisationEdit = z.object({
  version,
  name: shortText('What is your household or firm called?'),
  timeZone: z.string().refine(isTimeZone, 'That time zone is not known.'),
  contactPhone: z.string().trim().max(40, 'At most 40 letters, please.').nullable().transform(text => text || null),
  dangerResponseHours: whole('the hours for danger', 1, 720),
  urgentResponseHours: whole('the hours for urgent matters', 1, 720),
  routineResponseDays: whole('the days for routine matters', 1, 365),
  entryNoticeHours: whole('the hours of notice', 0, 720),
  reviewHour: whole('the hour of the daily review', 0, 23),
  seasonAllowanceMm: z.number({ error: 'Please give the season allowance in millimetres.' }).min(0, 'From 0 to 50 mm, please.').max(50, 'From 0 to 50 mm, please.'),
}).strict().refine(input => input.dangerResponseHours <= input.urgentResponseHours, { path: ['urgentResponseHours'], message: 'Urgent matters cannot be answered sooner than danger.' })
export type OrganisationChanges = z.output<typeof OrganisationEdit>

export const MessagesQuery = z.object({
  state: z.enum(['queued', 'sent', 'failed'], { error: 'There is no such state of a message.' }).optional(),
  after: z.string().max(600).optional(),
})
