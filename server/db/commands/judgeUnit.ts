import { findUnitFindings } from '../../../shared/utils/upkeep/findUnitFindings'
import type { Finding, FindingEvidence } from '../../../shared/types/finding'
import type { Trx } from '../connect'
import { dayIn } from '../../utils/clock'
import { findContacts, findOpenJobs, findReviewedUnit, type Contacts, type OpenJob, type ReviewedUnit } from '../queries/reviewing'
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
  const today = dayIn(unit.timeZone)
  const scope = { organisationId: unit.organisationId, unitId: unit.id, subjectKinds: ['unit' as const, 'job' as const] }
  const contacts = await findContacts(trx, [unit.id], today)
  const findings = wantedOfUnit(unit, await findOpenJobs(trx, [unit.id]), contacts.get(unit.id), today)
  await tellStaffUrgent(trx, { ...scope, changes: await keepFindings(trx, scope, findings) })
  await updateUnitStatus(trx, unitId)
}

/** What stands to be said about the unit itself and its jobs; nothing once it is archived. */
export function wantedOfUnit(unit: ReviewedUnit, jobs: readonly OpenJob[], contacts: Contacts | undefined, today: string): Finding[] {
  return findUnitFindings({
    unitId: unit.id, today,
    jobs: unit.archivedAt ? [] : jobs.map(({ id, title, dueOn, priority }) => ({ id, title, dueOn, responseClass: priority })),
    contactProblem: unit.archivedAt ? null : contactProblemOf(contacts),
  })
}

type ContactProblem = FindingEvidence['no-working-contact']['reason'] | null

/** An empty home has nobody to reach. */
function contactProblemOf(contacts: Contacts | undefined): ContactProblem {
  if (!contacts || contacts.working > 0) return null
  return contacts.refused > 0 ? 'address-bounced' : 'no-address'
}
