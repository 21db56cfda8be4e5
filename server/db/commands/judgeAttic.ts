import type { JudgedContents } from '../../../shared/types/contents'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { findAtticFindings, type AtticJudgement } from '../../../shared/utils/upkeep/findAtticFindings'
import type { Trx } from '../connect'
import type { AtticStatusTable } from '../schema/upkeep'
import { dayIn, nowInstant } from '../../utils/clock'
import { asAtticDocument, findDocuments, findItemsIn, findLatestSurvey } from '../queries/attics'
import { asAtticItem, findJudgedAttic, findJudgedMark } from '../queries/judging'
import type { RecordActor } from './appendRecord'
import { judgeLockedMark } from './judgeMark'
import { keepFindings } from './keepFindings'
import { lockUnit } from './lockUnit'
import { tellStaffUrgent } from './tellStaff'
import { updateUnitStatus } from './updateUnitStatus'

export type JudgedAttic = NonNullable<Awaited<ReturnType<typeof findJudgedAttic>>>

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
  const survey = await findLatestSurvey(trx, attic.id)
  const { judgement, contents } = atticJudgement(attic, { survey, documents: await findDocuments(trx, attic.id), items: await findItemsIn(trx, attic.id) }, dayIn(attic.timeZone))
  await storeStatus(trx, attic, atticStatus(contents))
  const changes = await keepFindings(trx, scope, findAtticFindings(judgement))
  await tellStaffUrgent(trx, { ...scope, changes })
}

/** What an attic is judged from besides itself: the survey that holds, papers in force, what is up there. */
export interface AtticMaterial {
  survey: Pick<Survey, 'answers' | 'surveyedOn'> | undefined
  documents: Awaited<ReturnType<typeof findDocuments>>
  items: Awaited<ReturnType<typeof findItemsIn>>
}
type Survey = NonNullable<Awaited<ReturnType<typeof findLatestSurvey>>>

/** What the rules read of an attic today, and its contents judged. */
export function atticJudgement(attic: JudgedAttic, { survey, documents, items }: AtticMaterial, today: string): { judgement: AtticJudgement, contents: JudgedContents } {
  const contents = judgeContents({ survey: survey?.answers ?? null, documents: documents.map(asAtticDocument), items })
  const inspections = documents.filter(document => document.kind === 'inspection-record').map(document => document.writtenOn)
  return {
    contents,
    judgement: {
      atticId: attic.id, today, items: items.map(asAtticItem), rating: contents.rating,
      load: loadOf(contents), outside: contents.outside, ratedTotalLb: contents.ratedTotalLb,
      confirmedOn: attic.inventoryConfirmedOn,
      inspectedOn: [...inspections, ...(survey ? [survey.surveyedOn] : [])].sort().at(-1) ?? null,
    },
  }
}

/** The load plans of all fields together, as the rules read them; null while none can be drawn. */
function loadOf(contents: JudgedContents): AtticJudgement['load'] {
  const plans = contents.fields.flatMap(field => field.plan?.kind === 'judged' ? [{ fieldId: field.name, joists: field.plan.joists }] : [])
  if (plans.length === 0) return null
  return {
    totalLb: contents.totalLb, ratedTotalLb: contents.ratedTotalLb, heavyInMiddle: contents.heavyInMiddle,
    joists: plans.flatMap(({ fieldId, joists }) => joists.map(({ utilisation }, index) => ({ fieldId, joistNumber: index + 1, utilisation }))),
  }
}

export type AtticStatus = Pick<AtticStatusTable, 'loadState' | 'utilisation' | 'storedLb' | 'ratedPsf'>

/** What is kept of an attic's judgement for the portfolio. */
export function atticStatus({ state, rating, totalLb, utilisation }: JudgedContents): AtticStatus {
  const loadState = state === 'empty' ? 'within' : state === 'no-storage' ? totalLb > 0 ? 'over' : 'within' : state
  return { loadState, utilisation: rating && !rating.hold && utilisation !== null && Number.isFinite(utilisation) ? utilisation : null, storedLb: totalLb, ratedPsf: rating?.ratedPsf ?? null }
}

async function storeStatus(trx: Trx, attic: JudgedAttic, status: AtticStatus) {
  const row = { ...status, judgedAt: nowInstant() }
  await trx.insertInto('atticStatus').values({ atticId: attic.id, organisationId: attic.organisationId, unitId: attic.unitId, ...row })
    .onConflict(conflict => conflict.column('atticId').doUpdateSet(row)).execute()
}
