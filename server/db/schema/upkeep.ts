import type { AdviceCode, FindingRule, FindingSubjectKind, Severity } from '../../../shared/types/finding'
import type { Day, Defaulted, Instant, Json } from '../schema'

export interface UpkeepTables {
  finding: FindingTable
  findingEvent: FindingEventTable
  findingHindsight: FindingHindsightTable
  job: JobTable
  dueItem: DueItemTable
  message: MessageTable
  reviewRun: ReviewRunTable
  unitStatus: UnitStatusTable
  atticStatus: AtticStatusTable
}

export interface FindingTable {
  id: string
  organisationId: string
  unitId: string
  rule: FindingRule
  subjectKind: FindingSubjectKind
  subjectId: string
  severity: Severity
  adviceCode: AdviceCode
  evidence: Json<object>
  openedAt: Instant
  changedAt: Instant
  acknowledgedAt: Instant | null
  acknowledgedBy: string | null
  acknowledgedReason: string | null
  lookAgainOn: Day | null
  clearedAt: Instant | null
  version: Defaulted<number>
}

export interface FindingEventTable {
  id: string
  organisationId: string
  findingId: string
  kind: 'opened' | 'escalated' | 'eased' | 'acknowledged' | 'returned' | 'cleared'
  severity: Severity
  evidence: Json<object>
  reason: string | null
  actorId: string | null
  happenedAt: Instant
}

/** Append-only: the newest one of a finding counts. */
export interface FindingHindsightTable {
  id: string
  organisationId: string
  findingId: string
  outcome: 'right' | 'wrong'
  reason: string
  judgedBy: string
  judgedAt: Instant
}

export interface JobTable {
  id: string
  organisationId: string
  unitId: string
  number: number
  title: string
  description: Defaulted<string>
  findingId: string | null
  markId: string | null
  atticId: string | null
  priority: Defaulted<'danger' | 'urgent' | 'routine'>
  state: Defaulted<'planned' | 'scheduled' | 'done' | 'confirmed' | 'cancelled'>
  assigneeUserId: string | null
  scheduledOn: Day | null
  dueOn: Day
  doneOn: Day | null
  outcome: string | null
  costCents: number | null
  createdBy: string
  createdAt: Instant
  version: Defaulted<number>
}

export interface DueItemTable {
  id: string
  organisationId: string
  unitId: string
  kind: string
  subjectId: string
  dueOn: Day
  remindersSent: Defaulted<number>
  lastRemindedOn: Day | null
  settledAt: Instant | null
  createdAt: Instant
}

/** Outgoing mail, written in the transaction of its cause; dedupe_key makes a second one impossible. */
export interface MessageTable {
  id: string
  organisationId: string | null
  userId: string | null
  kind: string
  mailClass: 'safety' | 'duty' | 'habit' | 'account'
  toAddress: string
  subject: string
  textBody: string
  htmlBody: string
  dedupeKey: string
  state: Defaulted<'queued' | 'sent' | 'failed'>
  attempts: Defaulted<number>
  nextAttemptAt: Instant
  lastError: string | null
  createdAt: Instant
  sentAt: Instant | null
}

export interface ReviewRunTable {
  id: string
  organisationId: string
  reviewedOn: Day
  askedBy: string | null
  startedAt: Instant
  finishedAt: Instant | null
  counts: Json<object>
  error: string | null
}

/** What the portfolio reads; kept by the same commands that change its inputs. */
export interface UnitStatusTable {
  unitId: string
  organisationId: string
  propertyId: string
  worstSeverity: Severity | null
  openFindings: Defaulted<number>
  topFindingId: string | null
  atticCount: Defaulted<number>
  loadState: 'within' | 'near' | 'over' | 'hold' | 'unsurveyed' | null
  utilisation: number | null
  storedLb: Defaulted<number>
  openMarks: Defaulted<number>
  activeMarks: Defaulted<number>
  lateReadings: Defaulted<number>
  changedAt: Instant
}

/** How an attic was last judged. `utilisation` is null where nothing may be stored, or where no survey tells. */
export interface AtticStatusTable {
  atticId: string
  organisationId: string
  unitId: string
  loadState: 'within' | 'near' | 'over' | 'hold' | 'unsurveyed'
  utilisation: number | null
  storedLb: number
  ratedPsf: number | null
  judgedAt: Instant
}
