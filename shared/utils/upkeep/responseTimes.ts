import type { Finding } from '../../types/finding'

export const RESPONSE_CLASSES = ['danger', 'urgent', 'routine'] as const
export type ResponseClass = typeof RESPONSE_CLASSES[number]

/** Hours from receipt to correction, by class, and hours of notice before entry. The organisation's own policy; local law governs. */
export interface ResponsePolicy { hours: Record<ResponseClass, number>, entryNoticeHours: number }

/**
 * Defaults are ours. 24 h and 30 days are the times HUD NSPIRE (ceiling standard v3.0, read second-hand) gives for severe and
 * moderate defects; 72 h is common practice; 24 h of notice before entry is the shorter of what many places ask.
 */
export const DEFAULT_RESPONSE_POLICY: ResponsePolicy = {
  hours: { danger: 24, urgent: 72, routine: 30 * 24 },
  entryNoticeHours: 24,
}

const MS_PER_HOUR = 3_600_000

function instantOf(at: string): number {
  const ms = Date.parse(at)
  if (Number.isNaN(ms)) throw new RangeError(`Not an instant: ${JSON.stringify(at)}`)
  return ms
}

/** Instant by which a matter received then has to be corrected. The clock starts when the server received the notice. */
export function correctBy(responseClass: ResponseClass, receivedAt: string, policy: ResponsePolicy = DEFAULT_RESPONSE_POLICY): string {
  return new Date(instantOf(receivedAt) + policy.hours[responseClass] * MS_PER_HOUR).toISOString()
}

/** Earliest instant of a non-emergency visit after notice was given. */
export function enterFrom(noticeGivenAt: string, policy: ResponsePolicy = DEFAULT_RESPONSE_POLICY): string {
  return new Date(instantOf(noticeGivenAt) + policy.entryNoticeHours * MS_PER_HOUR).toISOString()
}

/** Which clock a finding starts. */
export function responseClassOf(finding: Pick<Finding, 'rule' | 'severity'>): ResponseClass {
  if (finding.rule === 'danger-sign') return 'danger'
  return finding.severity === 'urgent' ? 'urgent' : 'routine'
}
