import { METHODS_BY_KIND, type DangerSign, type MarkKind, type ReadingMethod, type StainState, type TipState } from '#shared/types/mark'
import { CARD_MM, COINS_MM } from '#shared/utils/movement/widthComparisons'

/** What the person fills in; the photos stand beside it. */
export interface ReadingFormValues {
  takenOn: string
  method: ReadingMethod | 'could-not-measure'
  value: number | null
  atLeast: number | null
  atMost: number | null
  lengthMm: number | null
  spanMm: number | null
  tip: TipState | null
  stain: StainState | null
  dangerSigns: DangerSign[]
  reason: string | null
  note: string
  confirmed: boolean
}

const EASY: Partial<Record<MarkKind, ReadingMethod>> = { 'crack': 'coin-or-card', 'nail-pops': 'count', 'sag': 'guess', 'stain': 'guess' }

/** The way used last time comes first: one way all along is worth more than the best way once. */
export function firstValues(kind: MarkKind, today: string, lastMethod: string | undefined): ReadingFormValues {
  const suits = (METHODS_BY_KIND[kind] as readonly string[]).includes(lastMethod ?? '')
  return {
    takenOn: today, method: suits ? lastMethod as ReadingMethod : EASY[kind] ?? 'guess', value: null, atLeast: null, atMost: null, lengthMm: null, spanMm: null,
    tip: null, stain: kind === 'stain' ? 'dry' : null, dangerSigns: [], reason: null, note: '', confirmed: false,
  }
}

/** Only what the chosen way asks for is sent: a size left over from another way is not a reading. */
export function withoutLeftovers(values: ReadingFormValues): ReadingFormValues {
  const isRange = values.method === 'coin-or-card'
  const couldNot = values.method === 'could-not-measure'
  return {
    ...values,
    value: isRange || couldNot ? null : values.value,
    atLeast: isRange ? values.atLeast : null,
    atMost: isRange ? values.atMost : null,
    reason: couldNot ? values.reason : null,
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
