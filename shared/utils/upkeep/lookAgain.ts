import type { Finding } from '../../types/finding'
import { addDays } from '../days'

/** Ours: how long somebody may let a finding rest before it comes back. What endangers people rests shortest. */
export const MOST_REST_DAYS = { danger: 7, urgent: 30, attention: 180, notice: 365 } as const

/** The last day that may be named to look again at a finding. */
export function lookAgainUntilOn(finding: Pick<Finding, 'rule' | 'severity'>, today: string): string {
  return addDays(today, MOST_REST_DAYS[finding.rule === 'danger-sign' ? 'danger' : finding.severity])
}
