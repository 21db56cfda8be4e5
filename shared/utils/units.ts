/** All conversions for display, and formatting that always carries the unit. Calculations stay in ft, in, lb, psf and mm. */

export const UNIT_SYSTEMS = ['us', 'metric'] as const
export type UnitSystem = typeof UNIT_SYSTEMS[number]

/** Exact by definition: international foot, inch and avoirdupois pound (NIST SP 811, appendix B). */
const M_PER_FT = 0.3048
const MM_PER_IN = 25.4
const KG_PER_LB = 0.45359237
/** psf to kPa: lb × 9.80665 m/s² over ft². */
const KPA_PER_PSF = KG_PER_LB * 9.80665 / (M_PER_FT * M_PER_FT) / 1000

export const ftToM = (ft: number): number => ft * M_PER_FT
export const mToFt = (m: number): number => m / M_PER_FT
export const inToMm = (inches: number): number => inches * MM_PER_IN
export const mmToIn = (mm: number): number => mm / MM_PER_IN
export const lbToKg = (lb: number): number => lb * KG_PER_LB
export const kgToLb = (kg: number): number => kg / KG_PER_LB
export const psfToKpa = (psf: number): number => psf * KPA_PER_PSF
export const kpaToPsf = (kpa: number): number => kpa / KPA_PER_PSF
export const ft2ToM2 = (ft2: number): number => ft2 * M_PER_FT ** 2
export const ft3ToM3 = (ft3: number): number => ft3 * M_PER_FT ** 3
export const lbPerFt3ToKgPerM3 = (lbPerFt3: number): number => lbPerFt3 * KG_PER_LB / M_PER_FT ** 3

/** A number and its unit never part at the end of a line. */
export const NO_BREAK_SPACE = '\u00A0'

/** Making a formatter takes a hundred times as long as using it. */
const numberFormats: Intl.NumberFormat[] = []
const numberFormat = (decimals: number) => numberFormats[decimals] ??= new Intl.NumberFormat('en-US', { maximumFractionDigits: decimals })

/** Grouped, with at most so many decimals, and no minus before a zero. */
export function formatNumber(value: number, decimals = 0): string {
  const text = numberFormat(decimals).format(value)
  return text === '-0' ? '0' : text.replace('-', '−')
}

function withUnit(value: number, decimals: number, unit: string): string {
  return `${formatNumber(value, decimals)}${NO_BREAK_SPACE}${unit}`
}

/** Small quantities keep a decimal that large ones do not need. */
function decimalsFor(value: number, oneBelow: number): number {
  return Math.abs(value) < oneBelow ? 1 : 0
}

export function formatWeight(lb: number, system: UnitSystem = 'us'): string {
  const value = system === 'us' ? lb : lbToKg(lb)
  return withUnit(value, decimalsFor(value, 10), system === 'us' ? 'lb' : 'kg')
}

export function formatLength(ft: number, system: UnitSystem = 'us'): string {
  return system === 'us' ? withUnit(ft, 1, 'ft') : withUnit(ftToM(ft), 2, 'm')
}

/** Member sizes, openings, clear heights. */
export function formatInches(inches: number, system: UnitSystem = 'us'): string {
  return system === 'us' ? withUnit(inches, 2, 'in') : withUnit(inToMm(inches), 0, 'mm')
}

export function formatLoad(psf: number, system: UnitSystem = 'us'): string {
  return system === 'us' ? withUnit(psf, decimalsFor(psf, 10), 'psf') : withUnit(psfToKpa(psf), 2, 'kPa')
}

export function formatArea(ft2: number, system: UnitSystem = 'us'): string {
  return system === 'us' ? withUnit(ft2, decimalsFor(ft2, 10), 'ft²') : withUnit(ft2ToM2(ft2), 1, 'm²')
}

export function formatVolume(ft3: number, system: UnitSystem = 'us'): string {
  return system === 'us' ? withUnit(ft3, 1, 'ft³') : withUnit(ft3ToM3(ft3), 2, 'm³')
}

export function formatDensity(lbPerFt3: number, system: UnitSystem = 'us'): string {
  return system === 'us' ? withUnit(lbPerFt3, 1, 'lb/ft³') : withUnit(lbPerFt3ToKgPerM3(lbPerFt3), 0, 'kg/m³')
}

/** Crack widths are read in mm everywhere; US customary adds the inches. */
export function formatWidth(mm: number, system: UnitSystem = 'us'): string {
  const metric = withUnit(mm, mm < 10 ? 2 : 1, 'mm')
  return system === 'metric' ? metric : `${metric} (${withUnit(mmToIn(mm), mm < 10 ? 3 : 2, 'in')})`
}

/** A rate of widening or sagging. */
export function formatRate(mmPerYear: number, system: UnitSystem = 'us'): string {
  const metric = withUnit(mmPerYear, 1, 'mm a year')
  return system === 'metric' ? metric : `${metric} (${withUnit(mmToIn(mmPerYear), 2, 'in')})`
}

/** A share as a per cent. */
export function formatShare(share: number): string {
  return withUnit(share * 100, 0, '%')
}
