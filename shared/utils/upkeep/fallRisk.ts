import type { CeilingFinish } from '../../types/attic'
import { CEILING_PSF } from '../structure/deadLoadValues'

export interface CeilingAbove { ceilingFinish: CeilingFinish, ceilingHeightIn: number | null, isBedroom: boolean }

/** Common practice, no source: the usual height of a room nobody measured. */
export const USUAL_CEILING_HEIGHT_IN = 96
/** Ours: people lie under a bedroom's ceiling for hours, and do not see it coming. */
export const BEDROOM_WEIGHT = 2

/**
 * What could fall on whom, to put equally grave things in order: weight of the ceiling per square foot times the height it
 * falls from, twice that where people sleep. HHSRS hazard 29 looks at height and weight; the product of them is ours. An
 * unknown finish is taken as plaster, the heaviest. Only an order: it says nothing of how likely a fall is.
 */
export function fallRisk({ ceilingFinish, ceilingHeightIn, isBedroom }: CeilingAbove): number {
  return CEILING_PSF[ceilingFinish].psf * (ceilingHeightIn ?? USUAL_CEILING_HEIGHT_IN) / 12 * (isBedroom ? BEDROOM_WEIGHT : 1)
}
