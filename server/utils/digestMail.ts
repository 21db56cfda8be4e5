import { daysBetween, formatDay } from '../../shared/utils/days'
import { DUE_KIND_WORDS, dueSentence } from '../../shared/utils/messages/dueMessages'
import { findingSentence, findingTitle, SEVERITY_WORDS } from '../../shared/utils/messages/findingMessages'
import { ESTIMATE_CAVEAT, HANDS_OFF, LEAVE_ROOM, LEAVE_ROOM_SIGNS, NO_ATTIC_FOR_TENANTS, RECORD_CAVEAT, RESPONSE_TIMES_CAVEAT } from '../../shared/utils/messages/safety'
import type { Checkpoint } from '../db/commands/makeCheckpoint'
import type { DigestReader, DueLine, Home, WaitingFinding } from '../db/queries/digest'
import { appUrl } from './appUrl'
import { MOST_REMINDERS, type DigestLines } from './digestLines'
import { adviceOf, homeOf } from './findingMail'
import type { MailContent, MailItem } from './mailDesign'

interface Digest { reader: DigestReader, lines: DigestLines, today: string, organisationName: string, checkpoint?: Checkpoint }

/** One person's mail of the day, grouped by home, the home with the gravest matter first. */
export function digestMail(digest: Digest): MailContent {
  const { reader, today, organisationName } = digest
  const count = digest.lines.findings.length + digest.lines.due.length
  const things = count === 1 ? '1 thing needs you' : `${count} things need you`
  return {
    subject: `${things} · ${organisationName}, ${formatDay(today)}`,
    heading: reader.role === 'tenant' ? (count === 1 ? 'A reading to take' : 'Readings to take') : things,
    paragraphs: introFor(digest),
    groups: groupsOf(digest),
    action: actionFor(reader),
    footer: footerFor(digest),
  }
}

function introFor({ reader, lines }: Digest): string[] {
  if (reader.role === 'tenant') return ['A reading takes two minutes from the floor. It shows whether the mark is moving.', `${HANDS_OFF} ${NO_ATTIC_FOR_TENANTS}`]
  if (reader.role === 'trades') return ['Jobs of yours that are due. Each page says which hazards to know before you start.']
  const urgent = lines.findings.filter(entry => entry.finding.severity === 'urgent')
  if (urgent.length === 0) return ['Nothing here is urgent. Most important first.']
  return [`${urgent.length} of these ${urgent.length === 1 ? 'is' : 'are'} urgent. Start there.`, ...adviceOf(urgent)]
}

function groupsOf({ lines, today, reader }: Digest): NonNullable<MailContent['groups']> {
  const homes = new Map<string, { heading: string, items: MailItem[] }>()
  const add = (home: Home, item: MailItem) => {
    const group = homes.get(home.unitId) ?? { heading: homeOf(home), items: [] }
    group.items.push(item)
    homes.set(home.unitId, group)
  }
  for (const entry of lines.findings) add(entry, findingItem(entry, reader))
  for (const line of lines.due) add(line, dueLineItem(line, today, reader))
  return [...homes.values()]
}

const findingItem = ({ id, finding }: WaitingFinding, reader: DigestReader): MailItem => ({
  title: `${SEVERITY_WORDS[finding.severity]}: ${findingTitle(finding)}`,
  detail: findingSentence(finding, reader.unitsOfMeasure),
  href: appUrl(`/findings/${id}`), label: 'See why, and decide',
})

const DUE_LINKS: Record<DueLine['kind'], (line: DueLine) => { href: string, label: string }> = {
  'reading': line => ({ href: appUrl(`/marks/${line.subjectId}/reading`), label: 'Take the reading' }),
  'inventory': line => ({ href: appUrl(`/attics/${line.subjectId}`), label: 'Look through the list' }),
  'inspection': line => ({ href: appUrl(`/attics/${line.subjectId}`), label: 'Open the attic' }),
  'job': line => ({ href: appUrl(`/jobs/${line.subjectId}`), label: 'Open the job' }),
  'look-again': line => ({ href: appUrl(`/findings/${line.subjectId}`), label: 'Look again' }),
  'invitation': () => ({ href: appUrl('/people'), label: 'See who is invited' }),
}

function dueLineItem(line: DueLine, today: string, reader: DigestReader): MailItem {
  const late = dueSentence({ kind: line.kind, dueOn: line.dueOn, daysLate: Math.max(0, daysBetween(line.dueOn, today)) })
  const unanswered = reader.role !== 'tenant' && line.kind === 'reading' && line.remindersSent >= MOST_REMINDERS ? ` The tenant was asked ${MOST_REMINDERS} times.` : ''
  return { title: `${DUE_KIND_WORDS[line.kind]}: ${line.label}`, detail: `${late}.${unanswered}`, ...DUE_LINKS[line.kind](line) }
}

function actionFor({ role, unitIds }: DigestReader): MailContent['action'] {
  if (role === 'tenant') return { label: 'Report something new', href: appUrl(unitIds[0] ? `/report/${unitIds[0]}` : '/my-home') }
  return role === 'trades' ? { label: 'See all your jobs', href: appUrl('/upkeep') } : { label: 'Open the overview', href: appUrl('/overview') }
}

function footerFor({ reader, organisationName, checkpoint }: Digest): string[] {
  const why = {
    owner: 'because you are an owner of', manager: 'because you are a manager of', tenant: 'because you live in a home of', trades: 'because you do jobs for',
  }[reader.role]
  return [
    ...(reader.role === 'tenant' ? [`${LEAVE_ROOM} ${LEAVE_ROOM_SIGNS}`] : [ESTIMATE_CAVEAT, RESPONSE_TIMES_CAVEAT]),
    ...(reader.role === 'owner' && checkpoint ? [`Checkpoint of the record on ${formatDay(checkpoint.madeOn)}, over ${checkpoint.entries} entries in ${checkpoint.chains} chains: ${checkpoint.hash}. ${RECORD_CAVEAT}`] : []),
    `You get this digest ${why} ${organisationName}, at most once a day. You can switch it off at ${appUrl('/account')}.`,
  ]
}
