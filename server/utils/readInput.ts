import type { z } from 'zod'
import { unsound } from './problems'

/** Input held against its schema: the output, or 422 with one kind sentence a field. Text that PostgreSQL cannot keep is refused here. */
export async function readInput<S extends z.ZodType>(schema: S, input: unknown): Promise<z.output<S>> {
  if (hasUnkeepableText(input)) throw unsound({}, 'The text has a character that cannot be kept.')
  const result = await schema.safeParseAsync(input)
  if (result.success) return result.data
  const fields: Record<string, string> = {}
  for (const issue of result.error.issues) fields[issue.path.join('.') || 'form'] ??= issue.message
  throw unsound(fields)
}

const MAX_DEPTH = 20

function hasUnkeepableText(value: unknown, depth = 0): boolean {
  if (depth > MAX_DEPTH) return true
  if (typeof value === 'string') return value.includes('\u0000') || !value.isWellFormed()
  if (Array.isArray(value)) return value.some(part => hasUnkeepableText(part, depth + 1))
  if (value && typeof value === 'object') return Object.entries(value).some(([key, part]) => hasUnkeepableText(key) || hasUnkeepableText(part, depth + 1))
  return false
}
