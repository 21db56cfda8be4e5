import type { Finding, FindingRule } from '../../shared/types/finding'
import type { UnitsOfMeasure } from '../../shared/types/people'
import { formatDay } from '../../shared/utils/days'
import { ADVICE_SENTENCES, findingSentence, findingTitle, SEVERITY_WORDS } from '../../shared/utils/messages/findingMessages'
import { ESTIMATE_CAVEAT, LEAVE_ROOM_SIGNS, RESPONSE_TIMES_CAVEAT } from '../../shared/utils/messages/safety'
import { reportNumber } from '../../shared/utils/report/reportNumber'
import { appUrl } from './appUrl'
import type { MailContent } from './mailDesign'

export interface MailedFinding { findingId: string, finding: Finding }
export interface MailedPlace { unitName: string, propertyName: string, organisationName: string }

/** Findings about people under a ceiling: their mail cannot be switched off. */
const LIFE_SAFETY: ReadonlySet<FindingRule> = new Set<FindingRule>(['danger-sign', 'mark-sudden', 'stain-wet', 'sag-over-limit', 'sag-growing'])

export const isLifeSafety = ({ rule, severity }: Pick<Finding, 'rule' | 'severity'>) => severity === 'urgent' && LIFE_SAFETY.has(rule)

export const homeOf = ({ propertyName, unitName }: Pick<MailedPlace, 'propertyName' | 'unitName'>) => `${propertyName}, ${unitName}`

const asItem = ({ findingId, finding }: MailedFinding, system: UnitsOfMeasure) => ({
  title: `${SEVERITY_WORDS[finding.severity]}: ${findingTitle(finding)}`,
  detail: findingSentence(finding, system),
  href: appUrl(`/findings/${findingId}`),
  label: 'See why, and decide',
})

/** What to do, each advice once, gravest finding first; the whole list of danger signs where people may have to leave. */
export function adviceOf(findings: { finding: Finding }[]): string[] {
  const codes = [...new Set(findings.map(({ finding }) => finding.adviceCode))]
  return [...codes.map(code => ADVICE_SENTENCES[code]), ...(codes.includes('leave-room-and-call') ? [LEAVE_ROOM_SIGNS] : [])]
}

const footerOf = ({ organisationName }: MailedPlace, mailClass: 'safety' | 'duty') => [
  ESTIMATE_CAVEAT,
  mailClass === 'safety'
    ? `You get this at once because you are an owner or manager of ${organisationName} and somebody may be in danger. Such mail cannot be switched off. Your address can be changed at ${appUrl('/account')}.`
    : `You get this because you are an owner or manager of ${organisationName} and it needs a decision soon. Your address can be changed at ${appUrl('/account')}.`,
]

interface UrgentMail { place: MailedPlace, findings: MailedFinding[], mailClass: 'safety' | 'duty', system: UnitsOfMeasure }

/** Urgent findings of one thing, gravest first. */
export function urgentFindingMail({ place, findings, mailClass, system }: UrgentMail): MailContent {
  const title = findingTitle(findings[0]!.finding)
  return {
    subject: `${mailClass === 'safety' ? 'Act now: ' : ''}${title} · ${homeOf(place)}`,
    heading: title,
    paragraphs: [`At ${homeOf(place)}.`, ...adviceOf(findings)],
    items: findings.map(entry => asItem(entry, system)),
    footer: footerOf(place, mailClass),
  }
}

export interface NewMarkMail extends UrgentMail {
  mark: { id: string, number: number, label: string, roomName: string }
  report: { number: number, reporterName: string }
}

/** A mark reported for the first time, with what was concluded from it at once. */
export function newMarkMail({ place, findings, mailClass, system, mark, report }: NewMarkMail): MailContent {
  return {
    subject: `${mailClass === 'safety' ? 'Act now: ' : ''}New mark in ${mark.roomName} · ${homeOf(place)}`,
    heading: `New mark reported: ${mark.label}`,
    paragraphs: [`${report.reporterName} reported it in ${mark.roomName} at ${homeOf(place)}. Report ${reportNumber(report.number)}, mark ${mark.number}.`, ...adviceOf(findings)],
    items: findings.map(entry => asItem(entry, system)),
    action: { label: 'See the mark and its photos', href: appUrl(`/marks/${mark.id}`) },
    footer: footerOf(place, mailClass),
  }
}

/** An urgent finding nobody has answered within the organisation's own response time. */
export function unansweredMail({ openedAt, ...mail }: UrgentMail & { openedAt: string }): MailContent {
  const urgent = urgentFindingMail(mail)
  return {
    ...urgent,
    subject: `Unanswered: ${urgent.subject}`,
    heading: `Nobody has answered this since ${formatDay(openedAt.slice(0, 10))}`,
    footer: [RESPONSE_TIMES_CAVEAT, ...urgent.footer],
  }
}
