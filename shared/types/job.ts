export const JOB_STATES = ['planned', 'scheduled', 'done', 'confirmed', 'cancelled'] as const
export type JobState = typeof JOB_STATES[number]

export const JOB_PRIORITIES = ['danger', 'urgent', 'routine'] as const
export type JobPriority = typeof JOB_PRIORITIES[number]

/** One line of a list. Cost is null to those it is no business of. */
export interface JobRow {
  id: string
  number: number
  title: string
  priority: JobPriority
  state: JobState
  unitId: string
  unitName: string
  propertyName: string
  assigneeName: string | null
  scheduledOn: string | null
  dueOn: string
  doneOn: string | null
  costCents: number | null
  version: number
}

export interface JobEventRow { id: string, recordedAt: string, actorName: string, action: string, before: Record<string, unknown> | null, after: Record<string, unknown> | null }

export interface JobView extends JobRow {
  description: string
  outcome: string | null
  findingId: string | null
  markId: string | null
  atticId: string | null
  assigneeUserId: string | null
  createdAt: string
  addressLines: string[]
  yearBuilt: number | null
  /** How to get in; only for those who do or manage the job. */
  accessNotes: string | null
  markLabel: string | null
  atticName: string | null
  findingRule: string | null
  contactPhone: string | null
  /** Where it may go from here, for the asker. */
  moves: JobState[]
  history: JobEventRow[]
  abilities: string[]
}

export interface JobChoices {
  units: { id: string, name: string, propertyName: string }[]
  assignees: { userId: string, name: string, role: string }[]
}
