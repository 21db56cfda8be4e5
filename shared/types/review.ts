export interface ReviewRun {
  id: string
  reviewedOn: string
  askedByName: string | null
  startedAt: string
  finishedAt: string | null
  counts: Partial<Record<'units' | 'unitsDone' | 'attics' | 'marks' | 'due' | 'unanswered' | 'digests', number>>
  error: string | null
}

export interface Reviews {
  runs: ReviewRun[]
  /** The day and hour of the next run by itself, in the organisation's time zone. */
  next: { on: string, hour: number, timeZone: string }
}

export const MESSAGE_STATES = ['queued', 'sent', 'failed'] as const
export type MessageState = typeof MESSAGE_STATES[number]

export interface MessageRow {
  id: string
  kind: string
  mailClass: 'safety' | 'duty' | 'habit' | 'account'
  toAddress: string
  subject: string
  state: MessageState
  attempts: number
  lastError: string | null
  createdAt: string
  nextAttemptAt: string
  sentAt: string | null
}
