import type { Finding, FindingEvidence } from '../../types/finding'
import { daysBetween } from '../days'
import type { ResponseClass } from './responseTimes'

export interface UnitJudgement {
  unitId: string
  today: string
  /** Open jobs with a day to be finished by. */
  jobs: readonly { id: string, title: string, dueOn: string, responseClass: ResponseClass }[]
  /** Why nobody in the unit can be reached; null when somebody can, or when nobody lives there. */
  contactProblem: FindingEvidence['no-working-contact']['reason'] | null
}

/** Jobs that are late, and homes where nobody can be reached. */
export function findUnitFindings({ unitId, today, jobs, contactProblem }: UnitJudgement): Finding[] {
  const late = jobs.map(job => ({ job, daysLate: daysBetween(job.dueOn, today) })).filter(({ daysLate }) => daysLate > 0)
  const findings: Finding[] = late.map(({ job, daysLate }) => ({
    rule: 'job-overdue', subject: { kind: 'job', id: job.id }, severity: job.responseClass === 'routine' ? 'attention' : 'urgent',
    evidence: { dueOn: job.dueOn, daysLate, title: job.title }, adviceCode: 'finish-job',
  }))
  if (contactProblem === null) return findings
  return [...findings, {
    rule: 'no-working-contact', subject: { kind: 'unit', id: unitId }, severity: 'notice',
    evidence: { reason: contactProblem }, adviceCode: 'find-contact',
  }]
}
