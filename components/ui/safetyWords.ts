import * as safety from '~/shared/utils/messages/safety'

export interface SafetyWords { title: string, text: readonly string[], urgent?: boolean }

/** The cautions by name, each whole. */
export const safetyWords = {
  'estimate': { title: 'An estimate, not an assessment', text: [safety.ESTIMATE_CAVEAT] },
  'trusses': { title: 'Trusses: no storage', text: [safety.TRUSS_CAUTION] },
  'hold': { title: 'On hold: no storage', text: [safety.HOLD_CAUTION], urgent: true },
  'leave-room': { title: 'Leave the room first', text: [safety.LEAVE_ROOM, safety.LEAVE_ROOM_SIGNS], urgent: true },
  'water': { title: 'Water and electricity', text: [safety.WATER_CAUTION], urgent: true },
  'hands-off': { title: 'Only look', text: [safety.HANDS_OFF] },
  'tenant-looks': { title: 'Only look', text: [safety.HANDS_OFF, safety.NO_ATTIC_FOR_TENANTS] },
  'attic-work': { title: 'Before you go up', text: [safety.ATTIC_WORK] },
  'asbestos': { title: 'May hold asbestos', text: [safety.ASBESTOS_CAUTION] },
  'lead': { title: 'May hold lead', text: [safety.LEAD_CAUTION] },
  'unload-first': { title: 'Unload first', text: [safety.UNLOAD_FIRST], urgent: true },
  'response-times': { title: 'About these times', text: [safety.RESPONSE_TIMES_CAVEAT] },
  'width-class': { title: 'What the width class says', text: [safety.WIDTH_CLASS_CAVEAT] },
} as const satisfies Record<string, SafetyWords>

export type SafetyCode = keyof typeof safetyWords
