import type { Finding } from '../../../shared/types/finding'
import { inventoryTotal } from '../../../shared/utils/goods/inventoryTotal'
import { rateAttic } from '../../../shared/utils/structure/rating'
import { findAtticFindings, NEAR_SHARE, type AtticJudgement } from '../../../shared/utils/upkeep/findAtticFindings'
import type { Trx } from '../connect'
import type { AtticStatusTable } from '../schema/upkeep'
import { dayIn, nowInstant } from '../../utils/clock'
import { ratedTotalLb } from '../../utils/judgedLoad'
import { asAtticDocument, findDocuments, findItemsIn, findLatestSurvey } from '../queries/attics'
import { asAtticItem, findJudgedAttic, findJudgedMark } from '../queries/judging'
import type { RecordActor } from './appendRecord'
import { judgeLockedMark } from './judgeMark'
import { keepFindings } from './keepFindings'
import { lockUnit } from './lockUnit'
import { tellStaffUrgent } from './tellStaff'
import { updateUnitStatus } from './updateUnitStatus'

type JudgedAttic = NonNullable<Awaited<ReturnType<typeof findJudgedAttic>>>

/**
 * Judges an attic anew from its latest survey, the documents in force and what is up there now: findings kept, urgent mail
 * queued, the marks under it judged again, the summaries of attic and unit refreshed.
 */
export async function judgeAttic(trx: Trx, _actor: RecordActor, atticId: string): Promise<void> {
  const attic = await findJudgedAttic(trx, atticId)
  if (!attic) return
  await lockUnit(trx, attic.organisationId, attic.unitId)
  await judgeLockedAttic(trx, attic)
  const marks = await trx.selectFrom('mark').select('id').where('atticId', '=', atticId).where('state', '!=', 'closed').orderBy('id').execute()
  for (const { id } of marks) {
    const mark = await findJudgedMark(trx, id)
    if (mark) await judgeLockedMark(trx, mark)
  }
  await updateUnitStatus(trx, attic.unitId)
}

/** The same for callers that hold the unit's lock, judge its marks and refresh its summary themselves. */
export async function judgeLockedAttic(trx: Trx, attic: JudgedAttic): Promise<void> {
  const scope = { organisationId: attic.organisationId, unitId: attic.unitId, subjectKinds: ['attic' as const], subjectId: attic.id }
  if (attic.archivedAt) {
    await keepFindings(trx, scope, [])
    await trx.deleteFrom('atticStatus').where('atticId', '=', attic.id).execute()
    return
  }
  const judgement = await judgementOf(trx, attic)
  const findings = findAtticFindings(judgement)
  await storeStatus(trx, attic, statusOf(judgement, findings))
  const changes = await keepFindings(trx, scope, findings)
  await tellStaffUrgent(trx, { ...scope, changes })
}

async function judgementOf(trx: Trx, attic: JudgedAttic): Promise<AtticJudgement> {
  const survey = await findLatestSurvey(trx, attic.id)
  const documents = await findDocuments(trx, attic.id)
  const items = (await findItemsIn(trx, attic.id)).map(asAtticItem)
  const rating = survey ? rateAttic(survey.answers, documents.map(asAtticDocument)) : null
  const inspections = documents.filter(document => document.kind === 'inspection-record').map(document => document.writtenOn)
  return {
    atticId: attic.id, today: dayIn(attic.timeZone), items, rating,
    load: null,
    ratedTotalLb: survey && rating ? ratedTotalLb(survey.answers, rating) : null,
    confirmedOn: attic.inventoryConfirmedOn,
    inspectedOn: [...inspections, ...(survey ? [survey.surveyedOn] : [])].sort().at(-1) ?? null,
  }
}

type Status = Pick<AtticStatusTable, 'loadState' | 'utilisation' | 'storedLb' | 'ratedPsf'>

function statusOf({ rating, load, ratedTotalLb: areaLb, items }: AtticJudgement, findings: Finding[]): Status {
  const storedLb = inventoryTotal(items).typicalLb
  if (!rating) return { loadState: 'unsurveyed', utilisation: null, storedLb, ratedPsf: null }
  const common = { storedLb, ratedPsf: rating.ratedPsf }
  if (rating.hold) return { ...common, loadState: 'hold', utilisation: null }
  if (rating.ratedPsf <= 0) return { ...common, loadState: storedLb > 0 ? 'over' : 'within', utilisation: null }
  const ratedLb = load?.ratedTotalLb ?? areaLb
  const shares = [...(ratedLb ? [storedLb / ratedLb] : []), ...(load?.joists ?? []).map(joist => joist.utilisation)].filter(Number.isFinite)
  const utilisation = shares.length > 0 ? Math.max(...shares) : null
  const over = (utilisation ?? 0) > 1 || findings.some(finding => finding.rule === 'joist-over')
  const near = (utilisation ?? 0) >= NEAR_SHARE || findings.some(finding => finding.rule === 'attic-may-exceed')
  return { ...common, utilisation, loadState: over ? 'over' : near ? 'near' : 'within' }
}

async function storeStatus(trx: Trx, attic: JudgedAttic, status: Status) {
  const row = { ...status, judgedAt: nowInstant() }
  await trx.insertInto('atticStatus').values({ atticId: attic.id, organisationId: attic.organisationId, unitId: attic.unitId, ...row })
    .onConflict(conflict => conflict.column('atticId').doUpdateSet(row)).execute()
}
