/** Why a room below is kept clear. */
export const KEEP_CLEAR_CAUSES = ['attic-over', 'attic-on-hold', 'danger-sign'] as const
export type KeepClearCause = typeof KEEP_CLEAR_CAUSES[number]

export interface KeepClearNotice {
  id: string
  unitId: string
  unitName: string
  propertyName: string
  roomId: string
  roomName: string
  cause: KeepClearCause
  atticId: string | null
  findingId: string | null
  /** The part of the room to keep clear, in words. */
  area: string
  waitingFor: string
  raisedAt: string
  raisedByName: string
  liftedAt: string | null
  liftedByName: string | null
  liftedReason: string | null
}

/** Something that is the case now and for which a notice may be raised. `roomId` is null where any room of the home may lie below. */
export interface OpenCause { cause: KeepClearCause, atticId: string | null, findingId: string | null, roomId: string | null, label: string }

/** What GET /api/units/:id/notices answers. */
export interface NoticesOfUnit {
  open: KeepClearNotice[]
  lifted: KeepClearNotice[]
  /** Both empty for people who may not raise one. */
  causes: OpenCause[]
  rooms: { id: string, name: string }[]
  contactPhone: string | null
}

/** What GET /api/notices/:id answers. */
export interface NoticeView extends KeepClearNotice {
  /** Whether what it was raised for is still the case. */
  isCauseOpen: boolean
  contact: { organisationName: string, phone: string | null }
  timeZone: string
  abilities: string[]
}
