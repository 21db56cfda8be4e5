import type { Severity, StoredFinding } from './finding'
import type { JobState } from './job'

/** A finding with where it is and what it is about, as lists and pages show it. */
export interface FindingRow {
  id: string
  version: number
  finding: StoredFinding
  changedAt: string
  unitId: string
  unitName: string
  propertyName: string
  subjectLabel: string
}

export interface FindingEventRow {
  id: string
  kind: 'opened' | 'escalated' | 'eased' | 'acknowledged' | 'returned' | 'cleared'
  severity: Severity
  evidence: Record<string, unknown>
  reason: string | null
  actorName: string | null
  happenedAt: string
}

export interface FindingView extends FindingRow {
  acknowledgedByName: string | null
  markId: string | null
  atticId: string | null
  events: FindingEventRow[]
  jobs: { id: string, number: number, title: string, state: JobState, dueOn: string }[]
  /** The latest day to look again that is allowed: shorter for graver matters. */
  lookAgainUntilOn: string
  /** When it should be put right by the organisation's own policy. */
  correctBy: string
  abilities: string[]
}

export const FINDING_LISTS = ['waiting', 'acknowledged', 'open', 'cleared', 'all'] as const
export type FindingList = typeof FINDING_LISTS[number]
