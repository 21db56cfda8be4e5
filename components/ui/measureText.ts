import { kgToLb, mToFt, mmToIn, type UnitSystem } from '~/shared/utils/units'
import { quantityFromText } from './quantityText'

/** The unit a quantity is kept in. */
export type Measure = 'ft' | 'in' | 'lb'

const SHOWN: Record<UnitSystem, Record<Measure, string>> = {
  us: { ft: 'ft', in: 'in', lb: 'lb' },
  metric: { ft: 'm', in: 'mm', lb: 'kg' },
}
const DECIMALS: Record<string, number> = { ft: 3, in: 3, lb: 2, m: 3, mm: 1, kg: 2 }

/** How much of the kept unit one of the written unit is. */
const FACTORS: Record<Measure, Record<string, number>> = {
  ft: { ft: 1, in: 1 / 12, m: mToFt(1), cm: mToFt(0.01), mm: mToFt(0.001) },
  in: { in: 1, ft: 12, mm: mmToIn(1), cm: mmToIn(10), m: mmToIn(1000) },
  lb: { lb: 1, oz: 1 / 16, kg: kgToLb(1), g: kgToLb(0.001) },
}
const SPELLINGS: Record<string, string> = {
  'feet': 'ft', 'foot': 'ft', '\'': 'ft', '′': 'ft', 'inch': 'in', 'inches': 'in', '"': 'in', '″': 'in', 'metre': 'm', 'metres': 'm', 'meter': 'm', 'meters': 'm',
  'lbs': 'lb', 'pound': 'lb', 'pounds': 'lb', 'kilo': 'kg', 'kilos': 'kg', 'ounces': 'oz',
}

export const shownUnit = (measure: Measure, system: UnitSystem): string => SHOWN[system][measure]

const PART = /\s*(-?[\d.,/⁄¼½¾⅛⅜⅝⅞ ]+?)\s*(['′"″]|[a-z]+)\.?(?=[\s\d]|$)/giy

/**
 * A length or weight as somebody typed it, in the unit it is kept in: '12', '12 ft 6 1/2 in', '12′ 6″', '3.8 m', '40 kg'.
 * Without a unit it is in the one shown beside the box. Null when empty; NaN when it is no number, or of another kind of unit.
 */
export function measureFromText(text: string, measure: Measure, system: UnitSystem): number | null {
  const plain = quantityFromText(text)
  if (plain === null) return null
  if (!Number.isNaN(plain)) return plain * FACTORS[measure][SHOWN[system][measure]]!
  const typed = text.trim().replace('−', '-')
  let sum = 0
  PART.lastIndex = 0
  while (PART.lastIndex < typed.length) {
    const part = PART.exec(typed)
    if (!part) return Number.NaN
    const unit = part[2]!.toLowerCase()
    const factor = FACTORS[measure][SPELLINGS[unit] ?? unit]
    const value = quantityFromText(part[1]!)
    if (factor === undefined || value === null) return Number.NaN
    sum += value * factor
  }
  return sum
}

/** The kept quantity in the person's own unit, short enough to read. */
export function textFromMeasure(value: number | null | undefined, measure: Measure, system: UnitSystem): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return ''
  const unit = SHOWN[system][measure]
  return String(Number((value / FACTORS[measure][unit]!).toFixed(DECIMALS[unit]!)))
}
