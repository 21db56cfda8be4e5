import { sql } from 'kysely'
import type { Finding, FindingRule, FindingSubjectKind, Severity } from '../../../shared/types/finding'
import { compareFindings, type FindingChange } from '../../../shared/utils/upkeep/compareFindings'
import type { Trx } from '../connect'
import { insertRows, rowSet } from '../rowSet'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { sortedJson } from '../../utils/recordHash'
import { appendRecords, type RecordActor } from './appendRecord'

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
  subjectId: string
  /** What stands now; undefined when cleared. */
  finding?: Finding
}

export type OpenRow = Awaited<ReturnType<typeof findOpen>>[number]

/** The open findings of judged things in one unit, and what they are to be. */
export interface JudgedFindings { organisationId: string, unitId: string, open: readonly OpenRow[], wanted: readonly Finding[] }

/** What the system concludes is its own doing, whoever's change led to it; that change has its own entry. */
const CONCLUDED_BY: RecordActor = { userId: null, name: 'Lathkey' }

/**
 * Makes the open findings of the judged things be exactly the wanted ones: opens, escalates, eases and clears, each with its
 * event and record entry, and keeps the numbers of unchanged ones fresh. An escalation ends an acknowledgement.
 * The caller holds the unit's lock, so that two judgements never open one finding twice.
 */
export async function keepFindings(trx: Trx, scope: JudgedScope, wanted: readonly Finding[]): Promise<KeptChange[]> {
  const [kept] = await keepAllFindings(trx, [{ organisationId: scope.organisationId, unitId: scope.unitId, open: await findOpen(trx, scope), wanted }])
  return kept!
}

function findOpen(trx: Trx, scope: JudgedScope) {
  return trx.selectFrom('finding').selectAll()
    .where('unitId', '=', scope.unitId).where('clearedAt', 'is', null).where('subjectKind', 'in', scope.subjectKinds)
    .$if(scope.subjectId !== undefined, query => query.where('subjectId', '=', scope.subjectId!))
    .orderBy('openedAt').orderBy('id').execute()
}

/** The same for many units at once; a fixed number of statements however many there are, none when nothing changed. */
export async function keepAllFindings(trx: Trx, judged: readonly JudgedFindings[]): Promise<KeptChange[][]> {
  const at = nowInstant()
  const planned = judged.map(one => ({ ...one, changes: changesOf(one).map(change => plan(one, change, at)) }))
  const all = planned.flatMap(({ changes }) => changes)
  await insertRows(trx, 'finding', all.flatMap(({ opened }) => opened ?? []), FINDING_COLUMNS)
  await updateFindings(trx, [...all.flatMap(({ updated }) => updated ?? []), ...planned.flatMap(freshEvidence)])
  await insertRows(trx, 'findingEvent', all.map(({ event }) => event), EVENT_COLUMNS)
  await appendRecords(trx, CONCLUDED_BY, all.map(({ event, kept, unitId }) => ({
    organisationId: event.organisationId, unitId, subjectKind: 'finding', subjectId: kept.findingId, action: `finding ${kept.kind}`,
    after: { rule: kept.rule, severity: kept.severity, evidence: event.evidence },
  })))
  return planned.map(({ changes }) => changes.map(({ kept }) => kept))
}

const changesOf = ({ open, wanted }: JudgedFindings): FindingChange[] =>
  compareFindings(open.map(({ id, rule, severity, subjectKind, subjectId }) => ({ id, rule, severity, subject: { kind: subjectKind, id: subjectId } })), wanted)

/** Whether keeping them would write anything. */
export const hasFindingChanges = (judged: JudgedFindings): boolean => changesOf(judged).length > 0 || freshEvidence({ ...judged, changes: [] }).length > 0

interface Plan {
  unitId: string
  kept: KeptChange
  opened?: ReturnType<typeof newRow>
  updated?: FindingUpdate
  event: { id: string, organisationId: string, findingId: string, kind: KeptChange['kind'], severity: Severity, evidence: object, happenedAt: string }
}

const newRow = ({ organisationId, unitId }: JudgedFindings, { rule, subject, severity, adviceCode, evidence }: Finding, at: string) => ({
  id: newId(), organisationId, unitId, rule, severity, adviceCode, subjectKind: subject.kind, subjectId: subject.id, evidence, openedAt: at, changedAt: at, version: 1,
})

const FINDING_COLUMNS = {
  id: 'uuid', organisationId: 'uuid', unitId: 'uuid', rule: 'text', severity: 'text', adviceCode: 'text', subjectKind: 'text', subjectId: 'uuid', evidence: 'jsonb',
  openedAt: 'timestamptz', changedAt: 'timestamptz', version: 'integer',
} as const
const EVENT_COLUMNS = { id: 'uuid', organisationId: 'uuid', findingId: 'uuid', kind: 'text', severity: 'text', evidence: 'jsonb', happenedAt: 'timestamptz' } as const

function plan(judged: JudgedFindings, change: FindingChange, at: string): Plan {
  const row = change.kind === 'open' ? undefined : judged.open.find(({ id }) => id === change.id)!
  const opened = change.kind === 'open' ? newRow(judged, change.finding, at) : undefined
  const now = change.kind === 'clear' ? row! : change.finding
  const { rule, severity, evidence } = now
  const kind = WORDS[change.kind]
  const findingId = row?.id ?? opened!.id
  const event = { id: newId(), organisationId: judged.organisationId, findingId, kind, severity, evidence, happenedAt: at }
  return {
    unitId: judged.unitId, event, opened,
    kept: { kind, findingId, eventId: event.id, rule, severity, subjectId: row?.subjectId ?? opened!.subjectId, ...change.kind === 'clear' ? {} : { finding: change.finding } },
    updated: row && {
      id: row.id, severity, adviceCode: now.adviceCode, evidence, changedAt: at, clearedAt: change.kind === 'clear' ? at : null,
      versionStep: change.kind === 'clear' ? 0 : 1, endsRest: change.kind === 'escalate',
    },
  }
}

const WORDS = { open: 'opened', escalate: 'escalated', ease: 'eased', clear: 'cleared' } as const

interface FindingUpdate { id: string, severity: Severity, adviceCode: string, evidence: object, changedAt: string | null, clearedAt: string | null, versionStep: number, endsRest: boolean }

async function updateFindings(trx: Trx, updates: FindingUpdate[]) {
  if (updates.length === 0) return
  const rows = rowSet(updates, { id: 'uuid', severity: 'text', adviceCode: 'text', evidence: 'jsonb', changedAt: 'timestamptz', clearedAt: 'timestamptz', versionStep: 'integer', endsRest: 'boolean' })
  await sql`update finding f set severity = v.severity, advice_code = v.advice_code, evidence = v.evidence, version = f.version + v.version_step,
    changed_at = coalesce(v.changed_at, f.changed_at), cleared_at = v.cleared_at,
    acknowledged_at = case when v.ends_rest then null else f.acknowledged_at end, acknowledged_by = case when v.ends_rest then null else f.acknowledged_by end,
    acknowledged_reason = case when v.ends_rest then null else f.acknowledged_reason end, look_again_on = case when v.ends_rest then null else f.look_again_on end
    from ${rows} where f.id = v.id`.execute(trx)
}

/** Numbers move without the severity changing: the open finding shows today's, its events keep those of their time. */
function freshEvidence({ open, wanted, changes }: JudgedFindings & { changes: Plan[] }): FindingUpdate[] {
  const changed = new Set(changes.map(({ kept }) => kept.findingId))
  return open.flatMap((row) => {
    const now = changed.has(row.id) ? undefined : wanted.find(finding => finding.rule === row.rule && finding.subject.id === row.subjectId && finding.severity === row.severity)
    if (!now || sortedJson(now.evidence) === sortedJson(row.evidence)) return []
    return [{ id: row.id, severity: row.severity, adviceCode: now.adviceCode, evidence: now.evidence, changedAt: null, clearedAt: null, versionStep: 0, endsRest: false }]
  })
}
