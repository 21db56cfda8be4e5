/** What an entry of the record can be about. */
export const RECORD_SUBJECTS = [
  'property', 'unit', 'room', 'tenancy', 'attic', 'survey', 'document', 'item', 'mark', 'observation', 'reading', 'photo',
  'finding', 'notice', 'trial', 'job', 'person', 'invitation', 'organisation', 'review', 'message',
] as const
export type RecordSubjectKind = typeof RECORD_SUBJECTS[number]

export interface RecordRow {
  id: string
  seq: number
  recordedAt: string
  actorName: string
  action: string
  subjectKind: string
  subjectId: string
  before: Record<string, unknown> | null
  after: Record<string, unknown> | null
  hash: string
}

export type ChainState = { kind: 'unbroken', entries: number } | { kind: 'broken', seq: number, why: string }

export interface RecordPage {
  rows: RecordRow[]
  next: string | null
  /** Checked now, over the whole chain; null on the pages after the first. */
  chain: ChainState | null
}
