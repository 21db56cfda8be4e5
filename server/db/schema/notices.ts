import type { KeepClearCause } from '../../../shared/types/notice'
import type { Instant } from '../schema'

export interface NoticeTables {
  keepClearNotice: KeepClearNoticeTable
}

export interface KeepClearNoticeTable {
  id: string
  organisationId: string
  unitId: string
  roomId: string
  cause: KeepClearCause
  atticId: string | null
  findingId: string | null
  area: string
  waitingFor: string
  raisedAt: Instant
  raisedBy: string
  liftedAt: Instant | null
  liftedBy: string | null
  liftedReason: string | null
}
