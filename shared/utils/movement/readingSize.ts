import type { MarkKind, ReadingMethod } from '../../types/mark'
import type { PhotoMeasure, SinceSet } from '../../types/readingDetail'
import { measureReading, MOST_VALUE, type GivenReading, type MeasuredReading } from './measureReading'
import { LEAST_STATIONS, lengthPx, photoWidth } from './photoScale'
import { personSigma } from './readingSigma'

/** What a person gives besides one number. */
export interface FullReading extends GivenReading {
  /** Measured once more, from the beginning. */
  second: number | null
  sinceSet: SinceSet | null
  photo: PhotoMeasure | null
  /** What the 100 mm check line of the printed card really measures. */
  checkRulerMm: number | null
}

export type SizeRefusal = 'second-not-here' | 'photo-not-here' | 'photo-too-few-stations' | 'photo-scale-unsound' | 'photo-point-outside' | 'since-set-not-here' | 'since-set-below-zero' | 'check-ruler-not-here' | 'card-misprinted'

export type ReadingSize
  = | (Extract<MeasuredReading, { kind: 'measured' }> & { first: number | null, second: number | null, stationsMm: number[] | null })
    | Extract<MeasuredReading, { kind: 'refused' }>
    | { kind: 'refused', field: 'second' | 'photo' | 'sinceSet' | 'checkRulerMm', why: SizeRefusal }

/** The check line of our printed card; papers/gaugeCard.ts draws it. */
export const CHECK_RULER_MM = 100
/** Ours, as printed on the card's sheet: beyond one part in a hundred it was printed at a wrong size and is not used. */
export const CHECK_RULER_RANGE_MM = [99, 101] as const

const refused = (field: 'second' | 'photo' | 'sinceSet' | 'checkRulerMm', why: SizeRefusal) => ({ kind: 'refused', field, why } as const)

/** Value and standard uncertainty of a reading as it was taken, with the reader's own double readings; or what is unsound. */
export function readingSize(kind: MarkKind, given: FullReading, pairs: readonly (readonly [number, number])[] = []): ReadingSize {
  if (given.photo) return photoSize(kind, given, given.photo)
  const unfit = unfitParts(given)
  if (unfit) return unfit
  const first = oneValue(given, given.value)
  const measured = measureReading(kind, { ...given, value: first })
  if (measured.kind === 'refused') return measured.field === 'value' && given.sinceSet ? refused('sinceSet', 'since-set-below-zero') : measured
  const alone = { ...measured, first: null, second: null, stationsMm: null }
  if (measured.low !== null) return given.second === null ? alone : refused('second', 'second-not-here')
  const sigma = personSigma(kind, measured.method, pairs)
  if (given.second === null) return { ...alone, sigma }
  const again = measureReading(kind, { ...given, value: oneValue(given, given.second) })
  if (given.sinceSet || again.kind === 'refused') return refused('second', 'second-not-here')
  return { ...alone, value: (measured.value + again.value) / 2, sigma, first: measured.value, second: again.value }
}

function unfitParts({ method, sinceSet, checkRulerMm }: FullReading) {
  if (sinceSet && method !== 'calipers' && method !== 'tell-tale') return refused('sinceSet', 'since-set-not-here')
  if (checkRulerMm === null) return null
  if (method !== 'gauge-card') return refused('checkRulerMm', 'check-ruler-not-here')
  return checkRulerMm >= CHECK_RULER_RANGE_MM[0] && checkRulerMm <= CHECK_RULER_RANGE_MM[1] ? null : refused('checkRulerMm', 'card-misprinted')
}

/** Pins and tell-tales show the change since they were set; a card that came out too large has thicker lines than it says. */
function oneValue({ sinceSet, checkRulerMm }: FullReading, value: number | null): number | null {
  if (sinceSet) return sinceSet.widthWhenSetMm + sinceSet.nowMm - sinceSet.setMm
  return value !== null && checkRulerMm !== null ? value * checkRulerMm / CHECK_RULER_MM : value
}

const WITH_PHOTO: readonly MarkKind[] = ['crack', 'stain']
/** A stain's edge is soft, however sharp the photo. */
const LEAST_STAIN_SIGMA_MM = 10

function photoSize(kind: MarkKind, { method, second }: { method: ReadingMethod, second: number | null }, photo: PhotoMeasure): ReadingSize {
  if (method !== 'photo-with-scale' || !WITH_PHOTO.includes(kind)) return refused('photo', 'photo-not-here')
  if (second !== null) return refused('second', 'second-not-here')
  if (!allInside(photo)) return refused('photo', 'photo-point-outside')
  if (lengthPx(photo.a, photo.b) < LEAST_SCALE_PX || !(photo.distanceMm > 0)) return refused('photo', 'photo-scale-unsound')
  if (photo.stations.length < LEAST_STATIONS) return refused('photo', 'photo-too-few-stations')
  const width = photoWidth(photo, photo.stations)
  if (width.kind !== 'measured') return refused('photo', 'photo-too-few-stations')
  if (width.widthMm > MOST_VALUE[kind]) return { kind: 'refused', field: 'value', why: 'value-out-of-range' }
  const sigma = kind === 'stain' ? Math.max(LEAST_STAIN_SIGMA_MM, width.sigmaMm) : width.sigmaMm
  return { kind: 'measured', method, value: width.widthMm, sigma, low: null, high: null, first: null, second: null, stationsMm: width.stationsMm }
}

/** Ours: a scale shorter than this in the picture makes every tap count for too much. */
export const LEAST_SCALE_PX = 40

const allInside = ({ a, b, stations, widthPx, heightPx }: PhotoMeasure) =>
  [a, b, ...stations.flatMap(({ p, q }) => [p, q])].every(({ xPx, yPx }) => xPx >= 0 && yPx >= 0 && xPx <= widthPx && yPx <= heightPx)

/** Ours: two readings at once that differ by more than 4 σ of their difference are more often a slip than the crack. */
export const pairDiffersTooMuch = (first: number, second: number, sigma: number) => Math.abs(first - second) > 4 * Math.SQRT2 * sigma
