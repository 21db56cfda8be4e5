import { daysBetween } from '../../shared/utils/days'
import type { DigestReader, DueLine, WaitingFinding } from '../db/queries/digest'

/** All ours: how often a reading is asked for before the landlord is told, and how far apart. */
export const MOST_REMINDERS = 3
const DAYS_BETWEEN_REMINDERS = 3
/** Ours: what still waits is said again after this many days even if nothing new came. */
const REPEAT_AFTER_DAYS = 7

export interface DigestPool { today: string, findings: WaitingFinding[], due: DueLine[], reachableUnits: ReadonlySet<string> }
export interface DigestLines { findings: WaitingFinding[], due: DueLine[] }

const isReminderDue = (line: DueLine, today: string) =>
  line.remindersSent < MOST_REMINDERS && (line.lastRemindedOn === null || daysBetween(line.lastRemindedOn, today) >= DAYS_BETWEEN_REMINDERS)

/** A reading is the landlord's to take where nobody can be asked, and to ask about after the reminders went unanswered. */
const isStaffReading = (line: DueLine, pool: DigestPool) => !pool.reachableUnits.has(line.unitId) || line.remindersSent >= MOST_REMINDERS

const hasNews = (lines: DigestLines, reader: DigestReader, today: string) => {
  const { lastDigestAt } = reader
  if (lastDigestAt === null) return true
  if (daysBetween(lastDigestAt.slice(0, 10), today) >= REPEAT_AFTER_DAYS) return true
  return lines.findings.some(entry => entry.changedAt > lastDigestAt)
    || lines.due.some(line => line.createdAt > lastDigestAt || (line.kind === 'reading' && line.remindersSent === MOST_REMINDERS && line.lastRemindedOn !== null && line.lastRemindedOn >= lastDigestAt.slice(0, 10)))
}

/**
 * What one person is to be told today; undefined when there is nothing, or nothing new since their last digest.
 * Staff: all that waits for a decision and all that is late. Tenants: the readings of their own home, up to three times each.
 * Trades: their own jobs that are due.
 */
export function digestLinesFor(reader: DigestReader, pool: DigestPool): DigestLines | undefined {
  if (reader.role === 'tenant') {
    const due = pool.due.filter(line => line.kind === 'reading' && reader.unitIds.includes(line.unitId) && isReminderDue(line, pool.today))
    return due.length > 0 ? { findings: [], due } : undefined
  }
  const lines: DigestLines = reader.role === 'trades'
    ? { findings: [], due: pool.due.filter(line => line.kind === 'job' && reader.jobIds.includes(line.subjectId)) }
    // A late job is a finding of its own; an overdue inspection or list too. Each is said once.
    : { findings: pool.findings, due: pool.due.filter(line => !saidByFinding(line, pool.findings) && (line.kind !== 'reading' || isStaffReading(line, pool))) }
  if (lines.findings.length + lines.due.length === 0) return undefined
  return hasNews(lines, reader, pool.today) ? lines : undefined
}

const RULE_OF_KIND: Partial<Record<DueLine['kind'], string>> = { reading: 'reading-overdue', inventory: 'inventory-stale', inspection: 'inspection-overdue', job: 'job-overdue' }
const saidByFinding = (line: DueLine, findings: WaitingFinding[]) =>
  findings.some(entry => entry.finding.subject.id === line.subjectId && entry.finding.rule === RULE_OF_KIND[line.kind])
