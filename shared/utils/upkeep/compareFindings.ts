import { SEVERITIES, type Finding, type FindingRule, type FindingSubject, type Severity } from '../../types/finding'

export interface OpenFinding { id: string, rule: FindingRule, subject: FindingSubject, severity: Severity }

export type FindingChange
  = | { kind: 'open', finding: Finding }
    | { kind: 'escalate', id: string, finding: Finding }
    | { kind: 'ease', id: string, finding: Finding }
    | { kind: 'clear', id: string }

function keyOf(finding: { rule: FindingRule, subject: FindingSubject }): string {
  return `${finding.rule} ${finding.subject.kind} ${finding.subject.id}`
}

export function severityRank(severity: Severity): number {
  return SEVERITIES.indexOf(severity)
}

/** The gravest of each rule and subject. */
function gravestByKey(wanted: readonly Finding[]): Map<string, Finding> {
  const byKey = new Map<string, Finding>()
  for (const finding of wanted) {
    const known = byKey.get(keyOf(finding))
    if (!known || severityRank(finding.severity) > severityRank(known.severity)) byKey.set(keyOf(finding), finding)
  }
  return byKey
}

/**
 * What has to change so that the open findings of the judged subjects are the wanted ones. One open finding per rule and subject;
 * a finding whose condition is gone clears. Unchanged ones are not in the list.
 */
export function compareFindings(open: readonly OpenFinding[], wanted: readonly Finding[]): FindingChange[] {
  const byKey = gravestByKey(wanted)
  const changes: FindingChange[] = []
  const kept = new Set<string>()
  for (const known of open) {
    const key = keyOf(known)
    const finding = byKey.get(key)
    if (!finding || kept.has(key)) {
      changes.push({ kind: 'clear', id: known.id })
      continue
    }
    kept.add(key)
    const step = severityRank(finding.severity) - severityRank(known.severity)
    if (step !== 0) changes.push({ kind: step > 0 ? 'escalate' : 'ease', id: known.id, finding })
  }
  for (const [key, finding] of byKey) {
    if (!kept.has(key)) changes.push({ kind: 'open', finding })
  }
  return changes
}
