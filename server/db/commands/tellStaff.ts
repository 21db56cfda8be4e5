import { severityRank } from '../../../shared/utils/upkeep/compareFindings'
import type { Trx } from '../connect'
import { now } from '../../utils/clock'
import { isLifeSafety, newMarkMail, urgentFindingMail, type MailedFinding } from '../../utils/findingMail'
import { findStaff, findUnitPlace, type JudgedMark, type JudgedReport, type StaffMember } from '../queries/judging'
import type { KeptChange } from './keepFindings'
import { queueMessage } from './queueMessage'

/** A mark counts as newly reported this long, so that a later judgement of an old one announces nothing. Ours. */
const NEW_FOR_HOURS = 24

type Told = KeptChange & MailedFinding

/** Opened or graver than before, gravest first. */
const raised = (changes: KeptChange[]): Told[] => changes
  .filter((change): change is Told => change.finding !== undefined && (change.kind === 'opened' || change.kind === 'escalated'))
  .sort((a, b) => Number(isLifeSafety(b.finding)) - Number(isLifeSafety(a.finding)) || severityRank(b.severity) - severityRank(a.severity))

const mailClassOf = (told: Told[]) => told.some(({ finding }) => isLifeSafety(finding)) ? 'safety' : 'duty'

/** Mail at once to owners and managers about what became urgent in one judgement: one a person, keyed by the gravest event. */
export async function tellStaffUrgent(trx: Trx, about: { organisationId: string, unitId: string, changes: KeptChange[] }, staff?: StaffMember[]) {
  const urgent = raised(about.changes).filter(change => change.severity === 'urgent')
  if (urgent.length === 0) return
  const place = await findUnitPlace(trx, about.unitId)
  const mailClass = mailClassOf(urgent)
  for (const person of staff ?? await findStaff(trx, about.organisationId)) {
    await queueMessage(trx, {
      organisationId: about.organisationId, userId: person.userId, kind: 'urgent-finding', mailClass, toAddress: person.email,
      content: urgentFindingMail({ place, findings: urgent, mailClass, system: person.unitsOfMeasure }),
      dedupeKey: `finding:${urgent[0]!.eventId}:${person.userId}`,
    })
  }
}

/** A newly reported mark is announced once to everybody who decides but the reporter; anything urgent later, as for all findings. */
export async function tellStaffAboutMark(trx: Trx, { mark, reports, changes }: { mark: JudgedMark, reports: readonly JudgedReport[], changes: KeptChange[] }) {
  const first = reports[0]
  const isNew = first !== undefined && now().getTime() - new Date(mark.createdAt).getTime() < NEW_FOR_HOURS * 3_600_000
  if (!isNew && !raised(changes).some(change => change.severity === 'urgent')) return
  const staff = await findStaff(trx, mark.organisationId)
  const untold = isNew ? await untoldOf(trx, mark.id, staff.filter(person => person.userId !== first.reportedBy)) : []
  if (untold.length > 0 && first) await announceMark(trx, mark, first, raised(changes), untold)
  await tellStaffUrgent(trx, { organisationId: mark.organisationId, unitId: mark.unitId, changes }, staff.filter(person => !untold.includes(person)))
}

const newMarkKey = (markId: string, userId: string) => `new-mark:${markId}:${userId}`

async function untoldOf(trx: Trx, markId: string, staff: StaffMember[]): Promise<StaffMember[]> {
  if (staff.length === 0) return []
  const told = await trx.selectFrom('message').select('dedupeKey').where('dedupeKey', 'in', staff.map(person => newMarkKey(markId, person.userId))).execute()
  return staff.filter(person => !told.some(({ dedupeKey }) => dedupeKey === newMarkKey(markId, person.userId)))
}

async function announceMark(trx: Trx, mark: JudgedMark, first: JudgedReport, told: Told[], people: StaffMember[]) {
  const place = await findUnitPlace(trx, mark.unitId)
  const { name: reporterName } = await trx.selectFrom('appUser').select('name').where('id', '=', first.reportedBy).executeTakeFirstOrThrow()
  const mailClass = mailClassOf(told)
  for (const person of people) {
    await queueMessage(trx, {
      organisationId: mark.organisationId, userId: person.userId, kind: 'new-finding', mailClass, toAddress: person.email,
      content: newMarkMail({ place, findings: told, mailClass, system: person.unitsOfMeasure, mark, report: { number: first.number, reporterName } }),
      dedupeKey: newMarkKey(mark.id, person.userId),
    })
  }
}
