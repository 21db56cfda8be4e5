import type { Trx } from '../connect'
import type { MarkKind, StainState } from '../../../shared/types/mark'
import type { ReadingDetail } from '../../../shared/types/readingDetail'
import type { MeasuredReading } from '../../../shared/utils/movement/measureReading'
import { QUANTITY_COLUMNS } from '../queries/readings'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord, type RecordActor } from './appendRecord'

interface NewReading {
  clientKey: string
  takenOn: string
  measured: Extract<MeasuredReading, { kind: 'measured' }> & { first?: number | null, second?: number | null } | { kind: 'could-not-measure', reason: string }
  lengthMm: number | null
  stain: StainState | null
  note: string
  detail: ReadingDetail
  photos: { id: string, sha256: string }[]
}

interface ReadMark { id: string, organisationId: string, unitId: string, number: number, kind: MarkKind, segment: number }

/** One reading of the segment the mark is given with, with its record entry. */
export async function insertReading(trx: Trx, actor: RecordActor & { userId: string }, mark: ReadMark, reading: NewReading): Promise<{ id: string, receivedAt: string }> {
  const { measured, photos, detail, stain, ...rest } = reading
  const size = measured.kind === 'measured'
    ? { method: measured.method, value: measured.value, sigma: measured.sigma, low: measured.low, high: measured.high, firstValue: measured.first ?? null, secondValue: measured.second ?? null, couldNotMeasureReason: null }
    : { method: 'could-not-measure' as const, value: null, sigma: null, low: null, high: null, firstValue: null, secondValue: null, couldNotMeasureReason: measured.reason }
  const row = {
    id: newId(), organisationId: mark.organisationId, unitId: mark.unitId, markId: mark.id, segment: mark.segment,
    quantity: QUANTITY_COLUMNS[mark.kind], ...size, ...rest, stainState: stain === 'none' ? null : stain,
    detail: JSON.stringify(detail), takenBy: actor.userId, receivedAt: nowInstant(),
  }
  await trx.insertInto('reading').values(row).execute()
  await appendRecord(trx, actor, {
    organisationId: mark.organisationId, unitId: mark.unitId, subjectKind: 'reading', subjectId: row.id, action: 'reading recorded',
    after: {
      markId: mark.id, markNumber: mark.number, segment: mark.segment, takenOn: row.takenOn, quantity: row.quantity, ...size,
      lengthMm: row.lengthMm, stainState: row.stainState, note: row.note, ...detail, photos,
    },
  })
  return { id: row.id, receivedAt: row.receivedAt }
}
