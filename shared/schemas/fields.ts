import { z } from 'zod'

/** Pieces that many inputs share. Messages are for the person who typed. */

const DAY = /^\d{4}-\d{2}-\d{2}$/

function isCalendarDay(text: string) {
  if (!DAY.test(text)) return false
  const date = new Date(`${text}T00:00:00Z`)
  return !Number.isNaN(date.getTime()) && date.toISOString().slice(0, 10) === text && text >= '1800-01-01' && text <= '2199-12-31'
}

export const day = (message = 'Please give a date.') => z.string({ error: message }).refine(isCalendarDay, 'That is not a date in the calendar.')

export const shortText = (message: string, max = 120) =>
  z.string({ error: message }).trim().min(1, message).max(max, `At most ${max} letters, please.`)

export const longText = (max = 5000) => z.string().trim().max(max, `At most ${max} letters, please.`)

/** A measure that must be above zero. `what` names it with its unit: 'the span in feet'. */
export const measure = (what: string, max: number, min = 0) =>
  z.number({ error: `Please give ${what}.` })
    .refine(value => value > min, `Please give ${what} as more than ${min}.`)
    .refine(value => value <= max, `That is more than ${max}. Is it in the right unit?`)

/** The same, where not knowing is an answer. */
export const measureOrUnknown = (what: string, max: number) => measure(what, max).nullable()

export const version = z.int().min(1)
export const id = z.uuid('That is not a known choice.')

export const pageLimit = z.coerce.number().int().min(1).max(200).default(50)
