import type { MarkTrend } from '../utils/movement/trend'
import type { LoadLink } from '../utils/movement/loadLink'
import type { CauseClue } from '../utils/movement/causeClues'
import type { Activity, DangerSign, Direction, MarkKind, MarkPlace, MarkShape, ObservationAnswers, ReadingMethod, StainState, TipState } from './mark'
import type { PhotoRef } from './photo'
import type { PhotoMeasure, SinceSet } from './readingDetail'

export type MarkState = 'open' | 'repaired' | 'closed'

export interface ReadingRow {
  id: string
  takenOn: string
  receivedAt: string
  takenBy: string
  segment: number
  method: ReadingMethod | 'could-not-measure'
  value: number | null
  sigma: number | null
  low: number | null
  high: number | null
  /** Of a double reading; `value` is their mean. */
  firstValue: number | null
  secondValue: number | null
  lengthMm: number | null
  spanMm: number | null
  tip: TipState | null
  tipPastMm: number | null
  photo: PhotoMeasure | null
  stationsMm: number[] | null
  sinceSet: SinceSet | null
  wroteFirst: number | null
  askedAgainstUsual: number | null
  phoneAt: string | null
  cameraOn: string | null
  /** The number of the mark it was taken of, before that was joined into this one. */
  fromMark: number | null
  stainState: Exclude<StainState, 'none'> | null
  /** The report made of danger signs seen with this reading. */
  reportId: string | null
  couldNotMeasureReason: string | null
  note: string
}

export interface MarkFacts {
  id: string
  organisationId: string
  unitId: string
  roomId: string
  atticId: string | null
  number: number
  kind: MarkKind
  label: string
  pinX: number
  pinY: number
  place: MarkPlace | null
  shape: MarkShape | null
  direction: Direction | null
  firstSeenOn: string
  state: MarkState
  segment: number
  activity: Activity
  widthClass: number | null
  lastValue: number | null
  lastReadOn: string | null
  slopePerYear: number | null
  nextReadingOn: string | null
  stainState: Exclude<StainState, 'none'> | null
  notes: string
  createdAt: string
  version: number
  /** Set while it counts as part of another mark. */
  joinedInto: string | null
}

export interface ReportRow {
  id: string
  number: number
  receivedAt: string
  reportedBy: string
  answers: ObservationAnswers
  dangerSigns: DangerSign[]
  startedAt: string | null
  correctedAt: string | null
  /** Both set where it was filled in by hand and entered later by `reportedBy`. */
  paperReporter: string | null
  paperFilledInOn: string | null
}

/** Weight in the attic above from this day on. */
export interface LoadStepRow { on: string, totalLb: number }

export interface MarkPhoto extends PhotoRef { readingId: string | null, observationId: string | null, uploadedBy: string }

export interface MarkJob { id: string, number: number, title: string, state: string, dueOn: string, doneOn: string | null }

/** One thing a person did with a mark, as the record has it. */
export interface MarkDeed {
  action: 'mark repaired' | 'mark reopened' | 'mark closed' | 'marks joined' | 'joining undone' | 'mark split'
  recordedAt: string
  actorName: string
  happenedOn: string | null
  reason: string | null
}

export interface MarkRepair { id: string, repairedOn: string, recordedAt: string, reason: string, recordedBy: string }

export interface MarkJoining { markId: string, number: number, label: string, intoId: string, intoNumber: number, intoLabel: string, reason: string, joinedAt: string, joinedBy: string }

/** A mark as its ceiling shows it. */
export interface CeilingMark {
  id: string
  number: number
  label: string
  kind: MarkKind
  state: MarkState
  activity: Activity
  roomId: string
  roomName: string
  pinX: number
  pinY: number
  lastValue: number | null
  lastReadOn: string | null
  nextReadingOn: string | null
  version: number
}

/** Everything GET /api/units/[unitId]/ceilings answers. */
export interface UnitCeilings {
  unit: { id: string, name: string, propertyName: string }
  rooms: { id: string, name: string, lengthFt: number | null, widthFt: number | null }[]
  marks: CeilingMark[]
  abilities: string[]
  today: string
}

/** Everything GET /api/marks/[markId] answers. */
export interface MarkPage {
  mark: MarkFacts
  room: { id: string, name: string, lengthFt: number | null, widthFt: number | null }
  unit: { id: string, name: string }
  property: { id: string, name: string, yearBuilt: number | null }
  attic: { id: string, name: string } | null
  rooms: { id: string, name: string, lengthFt: number | null, widthFt: number | null }[]
  /** Oldest first, every segment. */
  readings: ReadingRow[]
  /** Of the newest segment. */
  trend: MarkTrend
  loadSteps: LoadStepRow[]
  loadLinks: LoadLink[]
  clues: CauseClue[]
  reports: ReportRow[]
  photos: MarkPhoto[]
  jobs: MarkJob[]
  repairs: MarkRepair[]
  deeds: MarkDeed[]
  joinedInto: MarkJoining | null
  joinedFrom: MarkJoining[]
  /** Every mark of the home, this one among them, but those that count as part of another. */
  ceilingMarks: CeilingMark[]
  abilities: string[]
  today: string
  timeZone: string
  contactPhone: string | null
}

export interface MarkRow {
  id: string
  number: number
  label: string
  kind: MarkKind
  state: MarkState
  activity: Activity
  widthClass: number | null
  lastValue: number | null
  lastReadOn: string | null
  slopePerYear: number | null
  nextReadingOn: string | null
  stainState: Exclude<StainState, 'none'> | null
  unitId: string
  unitName: string
  propertyId: string
  propertyName: string
  roomName: string
}

/** What a sent reading is answered with. */
export interface ReadingAnswer {
  id: string
  markId: string
  takenOn: string
  receivedAt: string
  value: number | null
  /** Danger signs make a report of their own, with a receipt. */
  report: { id: string, number: number, dangerSigns: DangerSign[] } | null
  activity: Activity
  nextReadingOn: string | null
  /** It jumped: said at once, apart from any trend. */
  sudden: { value: number, baseline: number } | null
}
