import type { DangerSign } from '../../shared/types/mark'
import { DANGER_SIGN_WORDS } from '../../shared/utils/messages/markMessages'
import { ESTIMATE_CAVEAT, LEAVE_ROOM, LEAVE_ROOM_SIGNS } from '../../shared/utils/messages/safety'
import { reportNumber } from '../../shared/utils/report/reportNumber'
import { appUrl } from './appUrl'
import { homeOf, type MailedPlace } from './findingMail'
import type { MailContent } from './mailDesign'

export interface RepeatedReport {
  place: MailedPlace
  mark: { id: string, number: number, label: string }
  report: { id: string, number: number, reporterName: string, dangerSigns: readonly DangerSign[] }
}

/** A report about a mark that was on record before: notice all the same, with its own number and clock. */
export function repeatedReportMail({ place, mark, report }: RepeatedReport): MailContent {
  const danger = report.dangerSigns.length > 0
  return {
    subject: `${danger ? 'Act now: ' : ''}Reported again: ${mark.label} · ${homeOf(place)}`,
    heading: `Reported again: ${mark.label}`,
    paragraphs: [
      `${report.reporterName} reported mark ${mark.number} at ${homeOf(place)} again. Report ${reportNumber(report.number)}.`,
      ...(danger ? [`Danger signs: ${report.dangerSigns.map(sign => DANGER_SIGN_WORDS[sign]).join('; ')}.`, LEAVE_ROOM, LEAVE_ROOM_SIGNS] : []),
    ],
    action: { label: 'See what was reported', href: appUrl(`/reports/${report.id}`) },
    footer: [
      ESTIMATE_CAVEAT,
      `You get this because you are an owner or manager of ${place.organisationName}. Your address can be changed at ${appUrl('/account')}.`,
    ],
  }
}
