import type { Size, Species, StampedGrade } from '../../types/attic'
import { lumberValues, sectionProperties } from './lumber'
import { DRESSED_SIZES } from './lumberValues'
import { REPETITIVE } from './ndsFactors'
import { StructureRefused, requireNotNegative, requirePositive } from './structureRefused'

export interface JoistSpanInput {
  species: Species
  grade: StampedGrade
  size: Size
  spacingIn: number
  livePsf: number
  deadPsf: number
  deflectionDivisor: number
}

/**
 * Greatest span, inches, unrounded, on the basis of the IRC span tables: bending under dead and live load with
 * Cr = 1.15, deflection under live load alone. Refuses sizes outside the tables and loads that are not positive.
 */
export function maxJoistSpanIn(input: JoistSpanInput): number {
  requirePositive(input.spacingIn, 'spacingIn')
  requirePositive(input.livePsf, 'livePsf')
  requireNotNegative(input.deadPsf, 'deadPsf')
  requirePositive(input.deflectionDivisor, 'deflectionDivisor')
  const dressed = DRESSED_SIZES[input.size]
  if (!dressed) throw new StructureRefused('size-not-in-table', 'size')
  const { fbPsi, cf, ePsi } = lumberValues(input.species, input.grade, input.size)
  const { sectionModulusIn3, inertiaIn4 } = sectionProperties(dressed.breadthIn, dressed.depthIn)
  const totalLbPerIn = (input.livePsf + input.deadPsf) * input.spacingIn / 144
  const liveLbPerIn = input.livePsf * input.spacingIn / 144
  const bendingIn = Math.sqrt(8 * fbPsi * cf * REPETITIVE.cr * sectionModulusIn3 / totalLbPerIn)
  const deflectionIn = Math.cbrt(384 * ePsi * inertiaIn4 / (5 * input.deflectionDivisor * liveLbPerIn))
  return Math.min(bendingIn, deflectionIn)
}
