import { METHODS_BY_KIND, type DangerSign, type MarkKind, type ReadingMethod, type StainState, type TipState } from '#shared/types/mark'
import type { ReadingRow } from '#shared/types/markPage'
import type { PhotoMeasure } from '#shared/types/readingDetail'
import { CARD_MM, COINS_MM } from '#shared/utils/movement/widthComparisons'

/** What the person fills in; the photos stand beside it. */
export interface ReadingFormValues {
  takenOn: string
  method: ReadingMethod | 'could-not-measure'
  value: number | null
  /** A second reading is asked for. */
  twice: boolean
  second: number | null
  sinceSet: { nowMm: number | null, setMm: number | null, widthWhenSetMm: number | null }
  photo: PhotoMeasure | null
  checkRulerMm: number | null
  atLeast: number | null
  atMost: number | null
  lengthMm: number | null
  tipPastMm: number | null
  spanMm: number | null
  tip: TipState | null
  stain: StainState | null
  dangerSigns: DangerSign[]
  reason: string | null
  note: string
  confirmed: boolean
  wroteFirst: number | null
  dayConfirmed: boolean
}

const EASY: Partial<Record<MarkKind, ReadingMethod>> = { 'crack': 'coin-or-card', 'nail-pops': 'count', 'sag': 'guess', 'stain': 'guess' }

export const SET_METHODS = ['calipers', 'tell-tale'] as const
export const isSetMethod = (method: string): method is typeof SET_METHODS[number] => (SET_METHODS as readonly string[]).includes(method)

/** The way used last time comes first: one way all along is worth more than the best way once. */
export function firstValues(kind: MarkKind, today: string, readings: readonly ReadingRow[]): ReadingFormValues {
  const lastMethod = readings.at(-1)?.method
  const suits = (METHODS_BY_KIND[kind] as readonly string[]).includes(lastMethod ?? '')
  const lastSpan = readings.findLast(reading => reading.spanMm !== null)?.spanMm ?? null
  return {
    takenOn: today, method: suits ? lastMethod as ReadingMethod : EASY[kind] ?? 'guess', value: null, twice: false, second: null, sinceSet: lastSetting(readings), photo: null, checkRulerMm: null,
    atLeast: null, atMost: null, lengthMm: null, tipPastMm: null, spanMm: kind === 'sag' ? lastSpan : null,
    tip: null, stain: kind === 'stain' ? 'dry' : null, dangerSigns: [], reason: null, note: '', confirmed: false, wroteFirst: null, dayConfirmed: false,
  }
}

/** Pins and tell-tales are set once: the setting of last time holds. Without one, the width known last is the width of that day. */
function lastSetting(readings: readonly ReadingRow[]): ReadingFormValues['sinceSet'] {
  const { setMm = null, widthWhenSetMm = null } = readings.findLast(reading => reading.sinceSet)?.sinceSet ?? {}
  return { nowMm: null, setMm, widthWhenSetMm: widthWhenSetMm ?? readings.findLast(reading => reading.value !== null)?.value ?? null }
}

/** Only what the chosen way asks for is sent: a size left over from another way is not a reading. */
export function withoutLeftovers({ twice, ...values }: ReadingFormValues) {
  const { method } = values
  const isRange = method === 'coin-or-card'
  const isSet = isSetMethod(method)
  const photo = method === 'photo-with-scale' ? values.photo : null
  const isPlain = !isRange && !isSet && !photo && method !== 'could-not-measure'
  return {
    ...values,
    value: isPlain ? values.value : null,
    second: isPlain && twice ? values.second : null,
    sinceSet: isSet ? values.sinceSet : null,
    photo,
    checkRulerMm: method === 'gauge-card' ? values.checkRulerMm : null,
    tipPastMm: values.tip === 'past' ? values.tipPastMm : null,
    atLeast: isRange ? values.atLeast : null,
    atMost: isRange ? values.atMost : null,
    reason: method === 'could-not-measure' ? values.reason : null,
  }
}

/** Thinnest first; Number for the form, words for the eye. Sources in widthComparisons.ts. */
export const THICKNESSES = [
  { value: CARD_MM, label: `a bank card, ${CARD_MM} mm` },
  { value: COINS_MM.dime, label: `a dime, ${COINS_MM.dime} mm` },
  { value: COINS_MM.cent, label: `a cent, ${COINS_MM.cent} mm` },
  { value: COINS_MM.quarter, label: `a quarter, ${COINS_MM.quarter} mm` },
  { value: COINS_MM.nickel, label: `a nickel, ${COINS_MM.nickel} mm` },
  { value: COINS_MM.half, label: `a half dollar, ${COINS_MM.half} mm` },
  { value: Number((2 * COINS_MM.nickel).toFixed(2)), label: `two nickels, ${(2 * COINS_MM.nickel).toFixed(1)} mm` },
]
