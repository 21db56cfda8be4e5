import type { CrackShape, DangerSign, MarkKind, ObservationAnswers } from './mark'
import type { PhotoView } from './photo'

/** One screen each. Which of them are asked depends on the kind: shared/utils/report/questions.ts. */
export const REPORT_QUESTIONS = ['room', 'look', 'shape', 'where', 'size', 'run', 'wet', 'danger', 'changed', 'around', 'photos', 'send'] as const
export type ReportQuestion = typeof REPORT_QUESTIONS[number]

/** Answers on the way: the room and the kind come first, but not before the first two screens. */
export type ReportAnswers = Omit<ObservationAnswers, 'kind' | 'roomId'> & { kind: MarkKind | null, roomId: string | null }

/** What a person picks on "What does it look like?": the line of a crack, or another kind as a whole. */
export type ReportLook = CrackShape | MarkKind

/** 'none' is what a person ticks; it is never sent. */
export type DangerTick = DangerSign | 'none'

export interface DraftPhoto {
  /** Under which the picture is kept on this phone. */
  localId: string
  view: Extract<PhotoView, 'wide' | 'close' | 'item'>
  name: string
  state: 'kept' | 'uploaded' | 'refused'
  /** The server's own, once it has the picture. */
  photoId: string | null
  /** Why it was refused, in words. */
  problem: string | null
}

export interface ReportDraft {
  /** Sent as Idempotency-Key: the same report sent twice stays one. */
  key: string
  question: ReportQuestion
  answers: ReportAnswers
  noDanger: boolean
  sameAsMarkId: string | null
  photos: DraftPhoto[]
  savedAt: string
  /** Sending was asked for and no connection could be made yet. */
  isWaiting: boolean
}
