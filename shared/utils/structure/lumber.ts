import type { Size, Species, StampedGrade } from '../../types/attic'
import { CF_OVER_2X12, LUMBER, SIZE_CLASSES, SOUTHERN_PINE_BEFORE_JUNE_2013 } from './lumberValues'
import { StructureRefused } from './structureRefused'

export type SizeClass = Size | 'over 2x12'

/** Species and grade taken where no stamp is found (ours, the weakest common pair: NDS No. 3). */
export const NO_STAMP = { species: 'Spruce-pine-fir', grade: 'No.3' } as const satisfies { species: Species, grade: StampedGrade }

export interface LumberValues {
  fbPsi: number
  cf: number
  fvPsi: number
  fcPerpPsi: number
  ePsi: number
  eminPsi: number
  sizeClass: SizeClass
  source: string
}

/** Size class of a measured depth: the next nominal size up, whose size factor is the lower one. */
export function sizeClassOf(depthIn: number): SizeClass {
  return SIZE_CLASSES.find(row => depthIn <= row.nominalDepthIn)?.size ?? 'over 2x12'
}

/** Reference values and size factor, psi; NDS 2018 Supplement Tables 4A and 4B. */
export function lumberValues(species: Species, grade: StampedGrade, sizeClass: SizeClass, beforeJune2013 = false): LumberValues {
  const rows = beforeJune2013 && species === 'Southern pine' ? SOUTHERN_PINE_BEFORE_JUNE_2013 : LUMBER
  const row = rows.find(candidate => candidate.species === species && candidate.grade === grade)
  if (!row) throw new StructureRefused('species-or-grade-not-in-table', 'species')
  const { fvPsi, fcPerpPsi, ePsi, eminPsi, source } = row
  const common = { fvPsi, fcPerpPsi, ePsi, eminPsi, source, sizeClass }
  if (sizeClass === 'over 2x12') {
    return { ...common, fbPsi: typeof row.fbPsi === 'number' ? row.fbPsi : row.fbPsi['2x12'], cf: CF_OVER_2X12 }
  }
  // Southern pine's values hold the size factor already.
  if (typeof row.fbPsi !== 'number') return { ...common, fbPsi: row.fbPsi[sizeClass], cf: 1 }
  const cf = SIZE_CLASSES.find(candidate => candidate.size === sizeClass)?.cf
  if (cf === undefined) throw new StructureRefused('size-not-in-table', 'size')
  return { ...common, fbPsi: row.fbPsi, cf }
}

export interface SectionProperties { areaIn2: number, sectionModulusIn3: number, inertiaIn4: number }

/** Rectangle, bending about its strong axis. */
export function sectionProperties(breadthIn: number, depthIn: number): SectionProperties {
  return {
    areaIn2: breadthIn * depthIn,
    sectionModulusIn3: breadthIn * depthIn ** 2 / 6,
    inertiaIn4: breadthIn * depthIn ** 3 / 12,
  }
}
