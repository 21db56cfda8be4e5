import type { DangerSign, StainState } from './mark'

/** Least first: a finding escalates to the right. */
export const SEVERITIES = ['notice', 'attention', 'urgent'] as const
export type Severity = typeof SEVERITIES[number]

export const FINDING_RULES = [
  'attic-load', 'attic-may-exceed', 'joist-over', 'item-outside-joists', 'heavy-item-in-middle', 'contents-under-hold',
  'contents-without-survey', 'contents-without-storage', 'refused-item', 'inventory-stale',
  'new-mark', 'new-mark-under-load', 'mark-active', 'mark-sudden', 'width-class-up', 'nail-pops-growing', 'nail-pops-in-line',
  'sag-over-limit', 'sag-growing', 'stain-wet', 'danger-sign', 'reading-overdue',
  'inspection-overdue', 'job-overdue', 'no-working-contact',
] as const
export type FindingRule = typeof FINDING_RULES[number]

export const FINDING_SUBJECTS = ['attic', 'mark', 'unit', 'job'] as const
export type FindingSubjectKind = typeof FINDING_SUBJECTS[number]
export interface FindingSubject { kind: FindingSubjectKind, id: string }

/** What to do, as a code; sentences in shared/utils/messages/. */
export const ADVICE_CODES = [
  'stop-adding-and-unload', 'stop-adding', 'weigh-or-count', 'move-to-bearing-walls', 'mend-place', 'keep-empty-until-inspected',
  'survey-attic', 'empty-attic', 'take-out', 'confirm-inventory', 'watch-and-check-above', 'unload-then-engineer',
  'leave-room-and-call', 'look-then-engineer', 'find-the-leak', 'take-reading', 'inspect', 'finish-job', 'find-contact',
] as const
export type AdviceCode = typeof ADVICE_CODES[number]

/** The numbers at the time, one shape per rule. */
export interface FindingEvidence {
  'attic-load': { state: 'near' | 'over', totalLb: number, ratedTotalLb: number, ratedPsf: number, utilisation: number, chanceOfExceeding: number }
  'attic-may-exceed': { totalLb: number, highLb: number, ratedTotalLb: number, chanceOfExceeding: number }
  'joist-over': { fieldId: string, joistNumber: number, utilisation: number, joistsOver: number }
  'item-outside-joists': { itemId: string, label: string, itemCount: number }
  'heavy-item-in-middle': { itemId: string, label: string, pressurePsf: number, ratedPsf: number, itemCount: number }
  'contents-under-hold': { totalLb: number, holdReasons: string[] }
  'contents-without-survey': { totalLb: number, itemCount: number }
  'contents-without-storage': { totalLb: number, itemCount: number, basis: string }
  'refused-item': { itemId: string, label: string, reason: string, itemCount: number }
  'inventory-stale': { confirmedOn: string | null, dueOn: string }
  'new-mark': { firstSeenOn: string }
  'new-mark-under-load': { totalLb: number, utilisation: number | null, firstSeenOn: string }
  'mark-active': { slopePerYear: number, interval: [number, number], readingCount: number, spanDays: number, since: string, unit: 'mm' | 'pops' }
  'mark-sudden': { value: number, previous: number, rise: number, threshold: number, takenOn: string, unit: 'mm' | 'pops' }
  'width-class-up': { fromClass: number, toClass: number, widthMm: number, takenOn: string }
  'nail-pops-growing': { fromCount: number, toCount: number, takenOn: string }
  'nail-pops-in-line': { count: number, takenOn: string }
  'sag-over-limit': { dropMm: number, limitMm: number, divisor: number, spanMm: number, takenOn: string }
  'sag-growing': { slopePerYear: number, interval: [number, number], readingCount: number, spanDays: number }
  'stain-wet': { state: Extract<StainState, 'damp' | 'dripping'>, seenOn: string }
  'danger-sign': { signs: DangerSign[], seenOn: string }
  'reading-overdue': { dueOn: string, daysLate: number }
  'inspection-overdue': { dueOn: string, daysLate: number }
  'job-overdue': { dueOn: string, daysLate: number, title: string }
  'no-working-contact': { reason: 'no-address' | 'address-bounced' | 'no-tenancy' }
}

/** What the system concluded: rule, subject, severity, evidence, advice. One open finding per rule and subject. */
export interface FindingOf<R extends FindingRule> {
  rule: R
  subject: FindingSubject
  severity: Severity
  evidence: FindingEvidence[R]
  adviceCode: AdviceCode
}
/** Distributed over the rules, so that `rule` tells the shape of `evidence`. */
export type Finding = { [R in FindingRule]: FindingOf<R> }[FindingRule]

/** A finding as kept: it is never deleted. */
export type StoredFinding = Finding & {
  id: string
  openedAt: string
  clearedAt: string | null
  acknowledgedAt: string | null
  acknowledgedReason: string | null
  lookAgainOn: string | null
}
