import type { Day, Defaulted, Instant, Json } from '../schema'

export interface CeilingTables {
  mark: MarkTable
  observation: ObservationTable
  reading: ReadingTable
  photo: PhotoTable
  markRepair: MarkRepairTable
  markJoining: MarkJoiningTable
  markJoiningPart: MarkJoiningPartTable
}

type StainState = 'dry' | 'damp' | 'dripping'

export interface MarkTable {
  id: string
  organisationId: string
  unitId: string
  roomId: string
  atticId: string | null
  number: number
  kind: 'crack' | 'nail-pops' | 'sag' | 'stain'
  label: string
  pinX: number
  pinY: number
  place: string | null
  shape: string | null
  direction: string | null
  firstSeenOn: Day
  state: Defaulted<'open' | 'repaired' | 'closed'>
  segment: Defaulted<number>
  activity: Defaulted<'too-few-readings' | 'dormant' | 'watch' | 'active'>
  widthClass: number | null
  lastValue: number | null
  lastReadOn: Day | null
  slopePerYear: number | null
  nextReadingOn: Day | null
  stainState: StainState | null
  notes: Defaulted<string>
  createdBy: string
  createdAt: Instant
  version: Defaulted<number>
  /** Set while it counts as part of another mark; its state is then 'closed'. */
  joinedInto: string | null
}

export interface MarkRepairTable {
  id: string
  organisationId: string
  markId: string
  repairedOn: Day
  reason: string
  recordedBy: string
  recordedAt: Instant
}

export interface MarkJoiningTable {
  id: string
  organisationId: string
  markId: string
  intoId: string
  reason: string
  stateBefore: 'open' | 'repaired' | 'closed'
  joinedBy: string
  joinedAt: Instant
  undoneBy: string | null
  undoneAt: Instant | null
}

export interface MarkJoiningPartTable {
  joiningId: string
  organisationId: string
  kind: 'reading' | 'observation' | 'photo' | 'job' | 'mark_repair'
  partId: string
}

/** `answers` is ObservationAnswers of shared/types/mark.ts; received_at is the server's clock and starts every response time. */
export interface ObservationTable {
  id: string
  organisationId: string
  unitId: string
  roomId: string
  markId: string
  number: number
  answers: Json<object>
  dangerSigns: Defaulted<string[]>
  reportedBy: string
  clientKey: string
  receivedAt: Instant
  startedAt: Instant | null
  correctedAt: Instant | null
  paperReporter: string | null
  paperFilledInOn: Day | null
}

export interface ReadingTable {
  id: string
  organisationId: string
  unitId: string
  markId: string
  segment: number
  takenOn: Day
  value: number | null
  quantity: 'width_mm' | 'pop_count' | 'drop_mm' | 'size_mm'
  sigma: number | null
  low: number | null
  high: number | null
  /** Of a double reading; `value` is their mean. */
  firstValue: number | null
  secondValue: number | null
  lengthMm: number | null
  method: 'guess' | 'coin-or-card' | 'ruler' | 'photo-with-scale' | 'gauge-card' | 'tell-tale' | 'calipers' | 'count' | 'string-line' | 'could-not-measure'
  couldNotMeasureReason: string | null
  stainState: StainState | null
  note: Defaulted<string>
  detail: Json<object>
  takenBy: string
  clientKey: string
  receivedAt: Instant
}

export interface PhotoTable {
  id: string
  organisationId: string
  unitId: string
  markId: string | null
  observationId: string | null
  readingId: string | null
  itemId: string | null
  jobId: string | null
  view: Defaulted<'wide' | 'close' | 'before' | 'after' | 'item'>
  sha256: string
  widthPx: number
  heightPx: number
  byteLength: number
  storedKey: string
  cameraTime: string | null
  uploadedBy: string
  uploadedAt: Instant
}
