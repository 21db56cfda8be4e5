import type { ItemWeightRange } from '../../types/item'

/** Standard deviation of a weighed item (ours). */
export const WEIGHED_SD_LB = 0.5

export interface WeightEstimate { meanLb: number, sdLb: number }

/**
 * Mean (low + 4·typical + high)/6 and standard deviation (high − low)/6 of one piece (PERT); a weighed one has 0.5 lb.
 * Throws RangeError unless 0 ≤ low ≤ typical ≤ high.
 */
export function itemWeight({ weightSource, lowLb, typicalLb, highLb }: ItemWeightRange): WeightEstimate {
  if (!(lowLb >= 0 && lowLb <= typicalLb && typicalLb <= highLb && Number.isFinite(highLb))) {
    throw new RangeError(`Weights must rise from zero: ${lowLb}, ${typicalLb}, ${highLb}`)
  }
  if (weightSource === 'weighed') return { meanLb: typicalLb, sdLb: WEIGHED_SD_LB }
  return { meanLb: (lowLb + 4 * typicalLb + highLb) / 6, sdLb: (highLb - lowLb) / 6 }
}
