import type { Finding, FindingRule, FindingSubjectKind, Severity } from '../../../shared/types/finding'
import { compareFindings, type FindingChange } from '../../../shared/utils/upkeep/compareFindings'
import type { Trx } from '../connect'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { sortedJson } from '../../utils/recordHash'
import { appendRecord, type RecordActor } from './appendRecord'

/** Whose findings are judged: of these kinds in one unit, or of one thing. Others are left alone. */
export interface JudgedScope {
  organisationId: string
  unitId: string
  subjectKinds: FindingSubjectKind[]
  subjectId?: string
}

export interface KeptChange {
  kind: 'opened' | 'escalated' | 'eased' | 'cleared'
  findingId: string
  eventId: string
  rule: FindingRule
  severity: Severity
  /** What stands now; undefined when cleared. */
  finding?: Finding
}

type OpenRow = Awaited<ReturnType<typeof findOpen>>[number]

/** What the system concludes is its own doing, whoever's change led to it; that change has its own entry. */
const CONCLUDED_BY: RecordActor = { userId: null, name: 'Lathkey' }

/**
 * Makes the open findings of the judged things be exactly the wanted ones: opens, escalates, eases and clears, each with its
 * event and record entry, and keeps the numbers of unchanged ones fresh. An escalation ends an acknowledgement.
 * The caller holds the unit's lock, so that two judgements never open one finding twice.
 */
export async function keepFindings(trx: Trx, scope: JudgedScope, wanted: readonly Finding[]): Promise<KeptChange[]> {
  const open = await findOpen(trx, scope)
  const changes = compareFindings(open.map(({ id, rule, severity, subjectKind, subjectId }) => ({ id, rule, severity, subject: { kind: subjectKind, id: subjectId } })), wanted)
  const kept: KeptChange[] = []
  for (const change of changes) kept.push(await applyChange(trx, scope, change, open))
  await refreshEvidence(trx, open, wanted, new Set(kept.map(change => change.findingId)))
  return kept
}

function findOpen(trx: Trx, scope: JudgedScope) {
  return trx.selectFrom('finding').selectAll()
    .where('unitId', '=', scope.unitId).where('clearedAt', 'is', null).where('subjectKind', 'in', scope.subjectKinds)
    .$if(scope.subjectId !== undefined, query => query.where('subjectId', '=', scope.subjectId!))
    .orderBy('openedAt').orderBy('id').execute()
}

async function applyChange(trx: Trx, scope: JudgedScope, change: FindingChange, open: OpenRow[]): Promise<KeptChange> {
  const at = nowInstant()
  if (change.kind === 'clear') {
    const row = open.find(({ id }) => id === change.id)!
    await trx.updateTable('finding').set({ clearedAt: at, changedAt: at }).where('id', '=', row.id).execute()
    return note(trx, scope, { kind: 'cleared', findingId: row.id, rule: row.rule, severity: row.severity, evidence: row.evidence })
  }
  const { finding } = change
  const { rule, severity, evidence, adviceCode } = finding
  if (change.kind === 'open') {
    const findingId = newId()
    await trx.insertInto('finding').values({
      id: findingId, organisationId: scope.organisationId, unitId: scope.unitId, rule, severity, adviceCode,
      subjectKind: finding.subject.kind, subjectId: finding.subject.id, evidence: JSON.stringify(evidence), openedAt: at, changedAt: at,
    }).execute()
    return { ...await note(trx, scope, { kind: 'opened', findingId, rule, severity, evidence }), finding }
  }
  const graver = change.kind === 'escalate'
  await trx.updateTable('finding').set({
    severity, adviceCode, evidence: JSON.stringify(evidence), changedAt: at,
    ...(graver ? { acknowledgedAt: null, acknowledgedBy: null, acknowledgedReason: null, lookAgainOn: null } : {}),
  }).set(eb => ({ version: eb('version', '+', 1) })).where('id', '=', change.id).execute()
  return { ...await note(trx, scope, { kind: graver ? 'escalated' : 'eased', findingId: change.id, rule, severity, evidence }), finding }
}

interface Noted extends Omit<KeptChange, 'eventId' | 'finding'> { evidence: object }

async function note(trx: Trx, scope: JudgedScope, { evidence, ...change }: Noted): Promise<KeptChange> {
  const eventId = newId()
  const { organisationId, unitId } = scope
  const { kind, findingId, rule, severity } = change
  await trx.insertInto('findingEvent').values({ id: eventId, organisationId, findingId, kind, severity, evidence: JSON.stringify(evidence), happenedAt: nowInstant() }).execute()
  await appendRecord(trx, CONCLUDED_BY, { organisationId, unitId, subjectKind: 'finding', subjectId: findingId, action: `finding ${kind}`, after: { rule, severity, evidence } })
  return { ...change, eventId }
}

/** Numbers move without the severity changing: the open finding shows today's, its events keep those of their time. */
async function refreshEvidence(trx: Trx, open: OpenRow[], wanted: readonly Finding[], changed: Set<string>) {
  for (const row of open) {
    const now = changed.has(row.id) ? undefined : wanted.find(finding => finding.rule === row.rule && finding.subject.id === row.subjectId && finding.severity === row.severity)
    if (!now || sortedJson(now.evidence) === sortedJson(row.evidence)) continue
    await trx.updateTable('finding').set({ evidence: JSON.stringify(now.evidence), adviceCode: now.adviceCode }).where('id', '=', row.id).execute()
  }
}
