import { createHash } from 'node:crypto'

export interface RecordSubject { subjectKind: string, subjectId: string }

export interface HashedEntry extends RecordSubject {
  chainId: string
  seq: number
  recordedAt: string
  actorId: string | null
  actorName: string
  action: string
  before: object | null
  after: object | null
  previousHash: string
}

/** What the first entry of a chain follows. */
export const FIRST_HASH = '0'.repeat(64)

/** SHA-256 over the entry's fields as JSON with sorted keys: jsonb does not keep the order they came in. */
export function hashEntry(entry: HashedEntry): string {
  const { chainId, seq, recordedAt, actorId, actorName, action, subjectKind, subjectId, before, after, previousHash } = entry
  return createHash('sha256')
    .update(sortedJson({ chainId, seq, recordedAt, actorId, actorName, action, subjectKind, subjectId, before, after, previousHash }))
    .digest('hex')
}

export function sortedJson(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(sortedJson).join(',')}]`
  if (value && typeof value === 'object') {
    const parts = Object.entries(value).filter(([, part]) => part !== undefined)
      .sort(([a], [b]) => a < b ? -1 : 1)
      .map(([key, part]) => `${JSON.stringify(key)}:${sortedJson(part)}`)
    return `{${parts.join(',')}}`
  }
  return JSON.stringify(value)
}
