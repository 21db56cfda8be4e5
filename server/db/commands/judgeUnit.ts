import type { FindingEvidence } from '../../../shared/types/finding'
import { findUnitFindings } from '../../../shared/utils/upkeep/findUnitFindings'
import type { Trx } from '../connect'
import { dayIn } from '../../utils/clock'
import { findContacts, findOpenJobs, findReviewedUnit, type ReviewedUnit } from '../queries/reviewing'
import type { RecordActor } from './appendRecord'
import { keepFindings } from './keepFindings'
import { lockUnit } from './lockUnit'
import { tellStaffUrgent } from './tellStaff'
import { updateUnitStatus } from './updateUnitStatus'

/** Judges what belongs to a unit as a whole: late jobs, and whether anybody there can be reached. Call after changes of jobs and tenancies. */
export async function judgeUnit(trx: Trx, _actor: RecordActor, unitId: string): Promise<void> {
  const unit = await findReviewedUnit(trx, unitId)
  if (!unit) return
  await lockUnit(trx, unit.organisationId, unitId)
  await judgeLockedUnit(trx, unit)
  await updateUnitStatus(trx, unitId)
}

export async function judgeLockedUnit(trx: Trx, unit: ReviewedUnit): Promise<void> {
  const scope = { organisationId: unit.organisationId, unitId: unit.id, subjectKinds: ['unit' as const, 'job' as const] }
  const today = dayIn(unit.timeZone)
  const jobs = unit.archivedAt ? [] : await findOpenJobs(trx, unit.id)
  const findings = findUnitFindings({
    unitId: unit.id, today,
    jobs: jobs.map(({ id, title, dueOn, priority }) => ({ id, title, dueOn, responseClass: priority })),
    contactProblem: unit.archivedAt ? null : await contactProblemOf(trx, unit.id, today),
  })
  await tellStaffUrgent(trx, { ...scope, changes: await keepFindings(trx, scope, findings) })
}

type ContactProblem = FindingEvidence['no-working-contact']['reason'] | null

/** An empty home has nobody to reach; somebody invited and not yet come counts as reachable. */
async function contactProblemOf(trx: Trx, unitId: string, today: string): Promise<ContactProblem> {
  const contacts = await findContacts(trx, unitId, today)
  if (!contacts) return null
  if (contacts.working > 0) return null
  return contacts.refused > 0 ? 'address-bounced' : 'no-address'
}
