import { addDays, dayNumber, daysBetween } from '../days'
import { inspectionDueOn, inventoryDueOn } from './cadence'
import { nextReading, type PlannedMark } from './readingPlan'

export const DUE_KINDS = ['reading', 'inventory', 'inspection', 'job', 'look-again', 'invitation'] as const
export type DueKind = typeof DUE_KINDS[number]

export interface DueItem {
  kind: DueKind
  subjectId: string
  unitId: string | null
  dueOn: string
  daysLate: number
  priority: 'usual' | 'raised'
}

/** What one review looks at. Only open, unarchived things are passed in. */
export interface DueInput {
  marks: (PlannedMark & { id: string, unitId: string, readings: readonly { takenOn: string }[] })[]
  /** `confirmedOn`: when the list was last confirmed, else the day its first item was added; `inspectedOn` else the survey day. */
  attics: { id: string, unitId: string, itemCount: number, confirmedOn: string | null, inspectedOn: string | null }[]
  jobs: { id: string, unitId: string, dueOn: string | null }[]
  findings: { id: string, unitId: string, lookAgainOn: string | null }[]
  invitations: { id: string, unitId: string | null, expiresOn: string }[]
}

/** Ours: an invitation is mentioned this many days before it lapses, and not after. */
const INVITATION_WARNING_DAYS = 2

function dueItem(kind: DueKind, subject: { id: string, unitId: string | null }, dueOn: string, today: string, raised = false): DueItem[] {
  if (dayNumber(dueOn) > dayNumber(today)) return []
  return [{ kind, subjectId: subject.id, unitId: subject.unitId, dueOn, daysLate: daysBetween(dueOn, today), priority: raised ? 'raised' : 'usual' }]
}

function dueReadings(input: DueInput, today: string): DueItem[] {
  return input.marks.flatMap((mark) => {
    const next = nextReading(mark, mark.readings, today)
    if (!next) return []
    const raised = next.priority === 'raised'
    return dueItem('reading', mark, raised && next.dueOn > today ? today : next.dueOn, today, raised)
  })
}

function dueAttics(input: DueInput, today: string): DueItem[] {
  return input.attics.flatMap(attic => [
    ...(attic.itemCount > 0 && attic.confirmedOn !== null ? dueItem('inventory', attic, inventoryDueOn(attic.confirmedOn), today) : []),
    ...(attic.inspectedOn !== null ? dueItem('inspection', attic, inspectionDueOn(attic.inspectedOn, attic.itemCount > 0), today) : []),
  ])
}

function dueInvitations(input: DueInput, today: string): DueItem[] {
  return input.invitations
    .filter(invitation => dayNumber(invitation.expiresOn) >= dayNumber(today)
      && dayNumber(addDays(invitation.expiresOn, -INVITATION_WARNING_DAYS)) <= dayNumber(today))
    .map(invitation => ({
      kind: 'invitation' as const, subjectId: invitation.id, unitId: invitation.unitId,
      dueOn: invitation.expiresOn, daysLate: 0, priority: 'usual' as const,
    }))
}

/** Everything due today or before, raised ones first, then the latest first. */
export function dueItems(input: DueInput, today: string): DueItem[] {
  const items = [
    ...dueReadings(input, today),
    ...dueAttics(input, today),
    ...input.jobs.flatMap(job => (job.dueOn === null ? [] : dueItem('job', job, job.dueOn, today))),
    ...input.findings.flatMap(finding => (finding.lookAgainOn === null ? [] : dueItem('look-again', finding, finding.lookAgainOn, today))),
    ...dueInvitations(input, today),
  ]
  const rank = (item: DueItem) => (item.priority === 'raised' ? 0 : 1)
  return items.sort((a, b) => rank(a) - rank(b) || b.daysLate - a.daysLate || a.subjectId.localeCompare(b.subjectId))
}
