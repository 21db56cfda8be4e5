import type { KeepClearCause, KeepClearNotice } from '../../types/notice'
import type { PaperContact } from '../../types/paper'
import { clockInZone } from '../dayInZone'
import { formatDay } from '../days'
import { EMERGENCY_CALL, ESTIMATE_CAVEAT, HANDS_OFF, LEAVE_ROOM, LEAVE_ROOM_SIGNS, NO_ATTIC_FOR_TENANTS, WATER_CAUTION } from './safety'

export const WHOLE_ROOM = 'The whole room'

export const CAUSE_WORDS: Record<KeepClearCause, string> = {
  'attic-over': 'More is stored in the attic above than it is rated for.',
  'attic-on-hold': 'The attic above has damage and must be inspected.',
  'danger-sign': 'This ceiling shows a danger sign.',
}

/** What a notice waits for unless its writer says otherwise. */
export const WAITING_WORDS: Record<KeepClearCause, string> = {
  'attic-over': 'The attic is unloaded until it is within its rating, and the ceiling has been looked at.',
  'attic-on-hold': 'The attic is inspected, and the paper says that the ceiling is safe.',
  'danger-sign': 'A licensed engineer or the emergency service has looked at the ceiling and says that it is safe.',
}

/** '14 Mar 2027, 14:08' in the home's own time. */
export function momentWords(instant: string, timeZone: string): string {
  const { day, time } = clockInZone(timeZone, new Date(instant))
  return `${formatDay(day)}, ${time}`
}

export interface KeepClearText { word: string, area: string, cause: string, since: string, waitingFor: string, call: string, cautions: string[] }

/** Every sentence of a keep-clear notice. `since` is the instant already told in the home's own time. */
export function keepClearText(notice: Pick<KeepClearNotice, 'roomName' | 'area' | 'cause' | 'waitingFor'>, contact: PaperContact, since: string): KeepClearText {
  return {
    word: `Keep clear: ${notice.roomName}`,
    area: notice.area, cause: CAUSE_WORDS[notice.cause], since, waitingFor: notice.waitingFor,
    call: contact.phone ? `${contact.organisationName}, ${contact.phone}` : contact.organisationName,
    cautions: [
      `Nobody sits, sleeps, plays or works under this ceiling. Shut the door and keep others out.`,
      LEAVE_ROOM, LEAVE_ROOM_SIGNS, WATER_CAUTION, `${HANDS_OFF} ${NO_ATTIC_FOR_TENANTS}`, EMERGENCY_CALL, ESTIMATE_CAVEAT,
    ],
  }
}
