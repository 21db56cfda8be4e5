import type { Finding } from '../../../shared/types/finding'
import { dueItems } from '../../../shared/utils/upkeep/dueItems'
import { findAtticFindings } from '../../../shared/utils/upkeep/findAtticFindings'
import { findMarkFindings } from '../../../shared/utils/upkeep/findMarkFindings'
import { dayIn } from '../../utils/clock'
import type { JudgedMark, JudgedReport } from '../queries/judging'
import type { AtticUnderReview, MarkUnderReview, UnitUnderReview } from '../queries/reviewing'
import { atticJudgement, atticStatus, type AtticStatus } from './judgeAttic'
import { isMarkStatus, markJudgement, markStatus, type MarkStatus } from './judgeMark'
import { wantedOfUnit } from './judgeUnit'
import { dueChanges, type JudgedDue } from './keepDueItems'
import { hasFindingChanges, type JudgedFindings, type OpenRow } from './keepFindings'

interface JudgedAtticRow { id: string, organisationId: string, unitId: string, status: AtticStatus | null, isKept: boolean, wanted: Finding[] }

interface JudgedMarkRow { mark: JudgedMark, reports: readonly JudgedReport[], status: MarkStatus, isKept: boolean, wanted: Finding[] }

/** One unit judged: what its rows are to say. Nothing is written here. */
export interface ReviewedUnitVerdict {
  organisationId: string
  unitId: string
  today: string
  attics: JudgedAtticRow[]
  marks: JudgedMarkRow[]
  findings: JudgedFindings
  due: JudgedDue
  /** Acknowledged findings whose day to look again has come, as far as they still stand. */
  returning: OpenRow[]
}

function judgedAttic({ attic, kept, survey, documents, items }: AtticUnderReview, today: string): JudgedAtticRow {
  const { id, organisationId, unitId } = attic
  if (attic.archivedAt) return { id, organisationId, unitId, status: null, isKept: kept === null, wanted: [] }
  const { judgement, contents } = atticJudgement(attic, { survey, documents, items }, today)
  const status = atticStatus(contents)
  const isKept = kept !== null && (Object.keys(status) as (keyof AtticStatus)[]).every(name => kept[name] === status[name])
  return { id, organisationId, unitId, status, isKept, wanted: findAtticFindings(judgement) }
}

function judgedMark({ mark, sources }: MarkUnderReview, above: { row: AtticUnderReview, judged: JudgedAtticRow } | undefined, today: string): JudgedMarkRow {
  const material = { readings: sources.readings, reports: sources.reports, framing: above?.row.survey?.answers.framing ?? null, lastLoadChangeOn: above?.row.lastLoadChangeOn ?? null }
  // The attic above has just been judged anew; what is kept of it may be of yesterday.
  const under = { ...mark, aboveLb: above?.judged.status?.storedLb ?? null, aboveUtilisation: above?.judged.status?.utilisation ?? null }
  const judgement = markJudgement(under, material, today)
  const status = markStatus(under, judgement, material)
  return { mark: under, reports: sources.reports, status, isKept: isMarkStatus(mark, status), wanted: findMarkFindings(judgement) }
}

function dueIn({ unit, attics, marks, jobs }: UnitUnderReview, judged: JudgedMarkRow[], today: string) {
  if (unit.archivedAt) return []
  const changes = new Map(attics.map(({ attic, lastLoadChangeOn }) => [attic.id, attic.archivedAt ? null : lastLoadChangeOn]))
  return dueItems({
    marks: marks.map(({ mark, sources }, i) => ({
      id: mark.id, unitId: unit.id, activity: judged[i]!.status.activity, inTrial: mark.inTrial, closed: false, reportedOn: dayIn(unit.timeZone, new Date(mark.createdAt)),
      lastEventOn: mark.atticId ? changes.get(mark.atticId) ?? null : null, readings: sources.readings,
    })),
    attics: attics.filter(({ attic }) => !attic.archivedAt).map(({ attic, survey, documents, items }) => ({
      id: attic.id, unitId: unit.id, itemCount: items.length,
      confirmedOn: attic.inventoryConfirmedOn ?? items.map(item => item.placedOn).sort()[0] ?? null,
      inspectedOn: [...documents.filter(paper => paper.kind === 'inspection-record').map(paper => paper.writtenOn), ...(survey ? [survey.newestOn] : [])].sort().at(-1) ?? null,
    })),
    jobs: jobs.map(({ id, dueOn }) => ({ id, dueOn, unitId: unit.id })),
    findings: [], invitations: [],
  }, today)
}

/** Judges a unit from its rows: attics first, then the marks under them, then the unit itself. */
export function judgeForReview(under: UnitUnderReview): ReviewedUnitVerdict {
  const { unit } = under
  const { organisationId, id: unitId } = unit
  const today = dayIn(unit.timeZone)
  const attics = under.attics.map(row => judgedAttic(row, today))
  const aboveOf = (atticId: string | null) => {
    const at = under.attics.findIndex(({ attic }) => attic.id === atticId)
    return at === -1 ? undefined : { row: under.attics[at]!, judged: attics[at]! }
  }
  const marks = under.marks.map(row => judgedMark(row, aboveOf(row.mark.atticId), today))
  const wanted = [...attics.flatMap(attic => attic.wanted), ...marks.flatMap(mark => mark.wanted), ...wantedOfUnit(unit, under.jobs, under.contacts, today)]
  // Findings of marks that were not judged now are left as they are.
  const judged = new Set(marks.map(({ mark }) => mark.id))
  const open = under.findings.filter(row => row.subjectKind !== 'mark' || judged.has(row.subjectId))
  return {
    organisationId, unitId, today, attics, marks, findings: { organisationId, unitId, open, wanted },
    due: { organisationId, unitId, open: under.due, wanted: dueIn(under, marks, today) },
    returning: under.findings.filter(row => row.acknowledgedAt !== null && row.lookAgainOn !== null && row.lookAgainOn <= today),
  }
}

/** A mark reported within the last day may have to be announced, whatever else stayed the same. */
const NEW_MARK_MS = 24 * 3_600_000

/** Whether carrying the verdict out would write anything. */
export function wantsWriting({ attics, marks, findings, due, returning }: ReviewedUnitVerdict, atMs: number): boolean {
  const { done, added } = dueChanges(due)
  return attics.some(attic => !attic.isKept) || marks.some(({ isKept, mark }) => !isKept || atMs - Date.parse(mark.createdAt) < NEW_MARK_MS)
    || returning.length + done.length + added.length > 0 || hasFindingChanges(findings)
}
