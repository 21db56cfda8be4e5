import { isId } from './newId'
import { unsound } from './problems'

type Part = 'text' | 'number' | 'id'
type ValueOf<P extends Part> = P extends 'number' ? number : string

/** Where a list goes on: the sort values of the last row shown, as one opaque word. */
export function cursorOf(values: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(values)).toString('base64url')
}

/** The values of a cursor, or 422 when it is not one of ours for this list. */
export function readCursor<const P extends readonly Part[]>(text: string | undefined, parts: P): { [I in keyof P]: ValueOf<P[I]> } | undefined {
  if (text === undefined || text === '') return undefined
  const values = parsed(text)
  if (!Array.isArray(values) || values.length !== parts.length || !parts.every((part, i) => isA(part, values[i]))) {
    throw unsound({ after: 'This place in the list is not known. Please start from the top.' })
  }
  return values as { [I in keyof P]: ValueOf<P[I]> }
}

function parsed(text: string): unknown {
  try { return JSON.parse(Buffer.from(text, 'base64url').toString('utf8')) }
  catch { return undefined }
}

function isA(part: Part, value: unknown): boolean {
  if (part === 'number') return typeof value === 'number' && Number.isFinite(value)
  if (part === 'id') return isId(value)
  return typeof value === 'string' && !value.includes('\u0000') && value.isWellFormed()
}

/** The page asked for out of one row more than it holds. */
export function pageOf<T>(rows: T[], limit: number, valuesOf: (row: T) => readonly (string | number)[]): { rows: T[], next: string | null } {
  const shown = rows.slice(0, limit)
  const last = shown.at(-1)
  return { rows: shown, next: rows.length > limit && last ? cursorOf(valuesOf(last)) : null }
}

/** `%text%` with the pattern letters of LIKE taken as themselves. */
export const likeAnywhere = (text: string) => `%${text.replace(/[\\%_]/g, '\\$&')}%`
