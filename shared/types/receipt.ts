import type { DangerSign, MarkKind, ObservationAnswers, ReadingMethod } from './mark'
import type { MarkState } from './markPage'
import type { PaperOrigin } from './paperReport'
import type { PhotoRef } from './photo'

/** What the person who reported gets back at once, and may read again later. */
export interface Receipt {
  id: string
  number: number
  /** The server's clock: every response time starts here. */
  receivedAt: string
  reportedBy: string
  /** Set where it was filled in by hand and entered later by `reportedBy`. */
  paper: PaperOrigin | null
  timeZone: string
  unit: { id: string, name: string, propertyName: string }
  room: { id: string, name: string }
  mark: { id: string, number: number, label: string, kind: MarkKind, state: MarkState, firstSeenOn: string, nextReadingOn: string | null }
  /** The report was added to a mark that was there before. */
  joinedKnownMark: boolean
  answers: ObservationAnswers
  dangerSigns: DangerSign[]
  responseClass: 'danger' | 'urgent' | 'routine'
  /** By the organisation's own policy; local law governs. */
  correctBy: string
  startedAt: string | null
  correctedAt: string | null
  reading: { value: number, low: number | null, high: number | null, method: ReadingMethod } | null
  photos: PhotoRef[]
  contactPhone: string | null
}
