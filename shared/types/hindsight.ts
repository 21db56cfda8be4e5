import type { FindingRule, FindingSubjectKind, Severity } from './finding'

/** Whether a finding proved right, said later by a person. */
export const HINDSIGHT_OUTCOMES = ['right', 'wrong'] as const
export type HindsightOutcome = typeof HINDSIGHT_OUTCOMES[number]

export const LEDGER_LISTS = ['all', 'not-judged', ...HINDSIGHT_OUTCOMES] as const
export type LedgerList = typeof LEDGER_LISTS[number]

/** One saying; the newest of a finding counts, the earlier ones stay. */
export interface HindsightRow { id: string, outcome: HindsightOutcome, reason: string, judgedByName: string, judgedAt: string }

export interface LedgerRow {
  findingId: string
  rule: FindingRule
  severity: Severity
  subjectKind: FindingSubjectKind
  subjectId: string
  subjectLabel: string
  unitId: string
  unitName: string
  propertyName: string
  openedAt: string
  clearedAt: string | null
  outcome: HindsightOutcome | null
  reason: string | null
  judgedByName: string | null
  judgedAt: string | null
}

export interface LedgerCount { rule: FindingRule, opened: number, right: number, wrong: number, notJudged: number }

/** What GET /api/ledger answers: counts over everything the asker sees, and one page of findings, newest first. */
export interface LedgerPage { counts: LedgerCount[], rows: LedgerRow[], next: string | null }

/** An alarm the movement rules raise on one mark, when its readings are walked through again. */
export interface ReplayedAlarm {
  markId: string
  segment: number
  rule: Extract<FindingRule, 'mark-active' | 'sag-growing' | 'mark-sudden'>
  /** Day of the reading that raises it under the limits in force, and under the ones tried; null: not raised. */
  nowOn: string | null
  thenOn: string | null
  change: 'same' | 'gone' | 'new' | 'sooner' | 'later'
}

export interface RehearsedAlarm extends ReplayedAlarm {
  markNumber: number
  markLabel: string
  unitName: string
  propertyName: string
  findingId: string | null
  outcome: HindsightOutcome | null
}

/** What POST /api/limits/rehearsal answers: what the past would have looked like; nothing is changed. */
export interface LimitsRehearsalAnswer {
  marks: number
  /** Marks with readings that were not looked at, so that the answer stays quick. */
  marksLeftOut: number
  alarmsNow: number
  alarmsThen: number
  /** Alarms judged right or wrong in the ledger: kept or lost by the limits tried. */
  judged: { rightKept: number, rightLost: number, wrongKept: number, wrongSpared: number }
  /** Only what differs, newest first; at most 200. */
  changes: RehearsedAlarm[]
}
