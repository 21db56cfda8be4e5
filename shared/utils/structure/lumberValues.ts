import type { Size, Species, StampedGrade } from '../../types/attic'

const NDS_4A = 'NDS 2018 Supplement Table 4A'
const NDS_4B = 'NDS 2018 Supplement Table 4B, in force from 2013-06-01'
const NDS_4B_BEFORE = 'NDS 1991-2012 Supplement Table 4B, before June 2013; our copy is of medium to high confidence'
const NDS_DRESSED = 'NDS 2018 Supplement Table 1B, dry dressed sizes'

/** Dry dressed sizes. */
export const DRESSED_SIZES: Record<Size, { breadthIn: number, depthIn: number, source: string }> = {
  '2x4': { breadthIn: 1.5, depthIn: 3.5, source: NDS_DRESSED },
  '2x6': { breadthIn: 1.5, depthIn: 5.5, source: NDS_DRESSED },
  '2x8': { breadthIn: 1.5, depthIn: 7.25, source: NDS_DRESSED },
  '2x10': { breadthIn: 1.5, depthIn: 9.25, source: NDS_DRESSED },
  '2x12': { breadthIn: 1.5, depthIn: 11.25, source: NDS_DRESSED },
}

/** Nominal depth of a size class, and its size factor for bending (SS and No. 1 to No. 3, 2 in and 3 in thick). */
export const SIZE_CLASSES: { size: Size, nominalDepthIn: number, cf: number, source: string }[] = [
  { size: '2x4', nominalDepthIn: 4, cf: 1.5, source: NDS_4A },
  { size: '2x6', nominalDepthIn: 6, cf: 1.3, source: NDS_4A },
  { size: '2x8', nominalDepthIn: 8, cf: 1.2, source: NDS_4A },
  { size: '2x10', nominalDepthIn: 10, cf: 1.1, source: NDS_4A },
  { size: '2x12', nominalDepthIn: 12, cf: 1, source: NDS_4A },
]

/** NDS 2018 Supplement Tables 4A and 4B: 14 in and wider; southern pine wider than 12 in (4B, from memory). */
export const CF_OVER_2X12 = 0.9

/** One row: psi. `fbPsi` is one value for every size, or one per size where the table is size-specific. */
export interface LumberRow {
  species: Species
  grade: StampedGrade
  fbPsi: number | Record<Size, number>
  fvPsi: number
  fcPerpPsi: number
  ePsi: number
  eminPsi: number
  source: string
}

const bySize = (a: number, b: number, c: number, d: number, e: number): Record<Size, number> =>
  ({ '2x4': a, '2x6': b, '2x8': c, '2x10': d, '2x12': e })

/** Reference design values, visually graded dimension lumber, dry. Spruce-pine-fir has one row for No. 1 and No. 2. */
export const LUMBER: LumberRow[] = [
  { species: 'Douglas fir-larch', grade: 'SS', fbPsi: 1500, fvPsi: 180, fcPerpPsi: 625, ePsi: 1_900_000, eminPsi: 690_000, source: NDS_4A },
  { species: 'Douglas fir-larch', grade: 'No.1', fbPsi: 1000, fvPsi: 180, fcPerpPsi: 625, ePsi: 1_700_000, eminPsi: 620_000, source: NDS_4A },
  { species: 'Douglas fir-larch', grade: 'No.2', fbPsi: 900, fvPsi: 180, fcPerpPsi: 625, ePsi: 1_600_000, eminPsi: 580_000, source: NDS_4A },
  { species: 'Douglas fir-larch', grade: 'No.3', fbPsi: 525, fvPsi: 180, fcPerpPsi: 625, ePsi: 1_400_000, eminPsi: 510_000, source: NDS_4A },
  { species: 'Hem-fir', grade: 'SS', fbPsi: 1400, fvPsi: 150, fcPerpPsi: 405, ePsi: 1_600_000, eminPsi: 580_000, source: NDS_4A },
  { species: 'Hem-fir', grade: 'No.1', fbPsi: 975, fvPsi: 150, fcPerpPsi: 405, ePsi: 1_500_000, eminPsi: 550_000, source: NDS_4A },
  { species: 'Hem-fir', grade: 'No.2', fbPsi: 850, fvPsi: 150, fcPerpPsi: 405, ePsi: 1_300_000, eminPsi: 470_000, source: NDS_4A },
  { species: 'Hem-fir', grade: 'No.3', fbPsi: 500, fvPsi: 150, fcPerpPsi: 405, ePsi: 1_200_000, eminPsi: 440_000, source: NDS_4A },
  { species: 'Spruce-pine-fir', grade: 'SS', fbPsi: 1250, fvPsi: 135, fcPerpPsi: 425, ePsi: 1_500_000, eminPsi: 550_000, source: NDS_4A },
  { species: 'Spruce-pine-fir', grade: 'No.1', fbPsi: 875, fvPsi: 135, fcPerpPsi: 425, ePsi: 1_400_000, eminPsi: 510_000, source: NDS_4A },
  { species: 'Spruce-pine-fir', grade: 'No.2', fbPsi: 875, fvPsi: 135, fcPerpPsi: 425, ePsi: 1_400_000, eminPsi: 510_000, source: NDS_4A },
  { species: 'Spruce-pine-fir', grade: 'No.3', fbPsi: 500, fvPsi: 135, fcPerpPsi: 425, ePsi: 1_200_000, eminPsi: 440_000, source: NDS_4A },
  { species: 'Southern pine', grade: 'SS', fbPsi: bySize(2350, 2100, 1950, 1700, 1600), fvPsi: 175, fcPerpPsi: 565, ePsi: 1_800_000, eminPsi: 660_000, source: NDS_4B },
  { species: 'Southern pine', grade: 'No.1', fbPsi: bySize(1500, 1350, 1250, 1050, 1000), fvPsi: 175, fcPerpPsi: 565, ePsi: 1_600_000, eminPsi: 580_000, source: NDS_4B },
  { species: 'Southern pine', grade: 'No.2', fbPsi: bySize(1100, 1000, 925, 800, 750), fvPsi: 175, fcPerpPsi: 565, ePsi: 1_400_000, eminPsi: 510_000, source: NDS_4B },
  { species: 'Southern pine', grade: 'No.3', fbPsi: bySize(650, 575, 525, 475, 450), fvPsi: 175, fcPerpPsi: 565, ePsi: 1_300_000, eminPsi: 470_000, source: NDS_4B },
]

/** Taken only when a stamp and a date prove southern pine graded before June 2013. */
export const SOUTHERN_PINE_BEFORE_JUNE_2013: LumberRow[] = [
  { species: 'Southern pine', grade: 'SS', fbPsi: bySize(2850, 2550, 2300, 2050, 1900), fvPsi: 175, fcPerpPsi: 565, ePsi: 1_800_000, eminPsi: 660_000, source: NDS_4B_BEFORE },
  { species: 'Southern pine', grade: 'No.1', fbPsi: bySize(1850, 1650, 1500, 1300, 1250), fvPsi: 175, fcPerpPsi: 565, ePsi: 1_700_000, eminPsi: 620_000, source: NDS_4B_BEFORE },
  { species: 'Southern pine', grade: 'No.2', fbPsi: bySize(1500, 1250, 1200, 1050, 975), fvPsi: 175, fcPerpPsi: 565, ePsi: 1_600_000, eminPsi: 580_000, source: NDS_4B_BEFORE },
  { species: 'Southern pine', grade: 'No.3', fbPsi: bySize(850, 750, 700, 600, 575), fvPsi: 175, fcPerpPsi: 565, ePsi: 1_400_000, eminPsi: 510_000, source: NDS_4B_BEFORE },
]
