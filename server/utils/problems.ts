import type { H3Error } from 'h3'
import { createError } from 'h3'

export interface ProblemData { code: string, fields?: Record<string, string>, [more: string]: unknown }

/** Every refused request: a status, a kebab-case code, a sentence for a person, and the fields it is about. */
export function problem(status: number, code: string, message: string, more: Omit<ProblemData, 'code'> = {}): H3Error<ProblemData> {
  return createError<ProblemData>({ statusCode: status, message, data: { code, ...more } })
}

export const notSignedIn = () => problem(401, 'not-signed-in', 'Please sign in first.')
/** Signed in, but every membership has been ended. */
export const noMembership = () => problem(403, 'no-membership', 'You are signed in, but you are not part of an organisation any more.')
export const notAllowed = () => problem(403, 'not-allowed', 'Your role here does not include this.')
/** Absent and not-yours look the same. */
export const notFound = () => problem(404, 'not-found', 'There is nothing here, or it is not yours to see.')
export const unsound = (fields: Record<string, string>, message = 'Some answers need another look.') =>
  problem(422, 'unsound-input', message, { fields })
export const clash = (theirs: object, message = 'Somebody else changed this meanwhile. Both versions are shown.') =>
  problem(409, 'changed-meanwhile', message, { theirs })
/** A link of a mail that does not open anything any more. */
export const linkClosed = (code: 'link-unknown' | 'link-used' | 'link-expired' | 'link-revoked', message: string) =>
  problem(code === 'link-unknown' ? 404 : 410, code, message)
export const tooMany = (retryAfterSeconds: number) =>
  problem(429, 'too-many-tries', `Too many tries. Please try again ${waitWords(retryAfterSeconds)}.`, { retryAfterSeconds })

function waitWords(seconds: number): string {
  const minutes = Math.ceil(seconds / 60)
  if (minutes > 90) return `in about ${Math.round(minutes / 60)} hours`
  return minutes > 1 ? `in ${minutes} minutes` : 'in a minute'
}
export const databaseAway = () =>
  problem(503, 'database-away', 'The database cannot be reached just now. Nothing was lost; please try again in a moment.', { retryAfterSeconds: 5 })

interface DatabaseError { code?: string, constraint?: string, message?: string }

const AWAY = new Set(['ECONNREFUSED', 'ECONNRESET', 'EPIPE', 'ETIMEDOUT', 'ENOTFOUND', '57P01', '57P02', '57P03', '53300'])

/** What the database refused, said as a problem; undefined when it is not the database's doing. */
export function problemFromDatabase(error: unknown): H3Error<ProblemData> | undefined {
  const { code, constraint, message = '' } = (error ?? {}) as DatabaseError
  if ((code && (AWAY.has(code) || code.startsWith('08'))) || /Connection terminated|timeout exceeded when trying to connect|not currently accepting connections/.test(message)) return databaseAway()
  if (code === '23P01') return problem(409, 'overlaps', 'This overlaps in time with one that is there already.', { constraint })
  if (code === '23505') return problem(409, 'already-there', 'There is one like this already.', { constraint })
  if (code === '40001' || code === '40P01') return problem(409, 'changed-meanwhile', 'Somebody else was writing at the same moment. Please try again.')
  if (code === '23503' || code === '23514' || code === '23502') return problem(422, 'unsound-input', 'The database refused this as unsound.', { constraint })
  if (code?.startsWith('22')) return problem(422, 'unsound-input', 'A value is out of range or not readable.')
  return undefined
}
