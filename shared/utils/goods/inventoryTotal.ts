import type { ItemWeightRange } from '../../types/item'
import { normalBelow, Z_95 } from '../movement/normal'
import { itemWeight } from './itemWeight'

/** Ours: an error all estimates share (the same person guesses them all), which does not shrink with their number. */
export const SHARED_BIAS_SHARE = 0.1

export interface CountedWeight extends ItemWeightRange { count: number }

export interface InventoryTotal {
  itemCount: number
  /** Sum of typical weights: verdicts use this. */
  typicalLb: number
  meanLb: number
  sdLb: number
  /** 5 % and 95 % points of the total. */
  lowLb: number
  highLb: number
  weighedLb: number
  unweighedLb: number
}

/** Total of what is stored, with its uncertainty. Throws RangeError for a count that is not a whole number above zero. */
export function inventoryTotal(items: readonly CountedWeight[]): InventoryTotal {
  const total = { itemCount: 0, typicalLb: 0, meanLb: 0, variance: 0, weighedLb: 0, unweighedLb: 0 }
  for (const item of items) {
    if (!(Number.isInteger(item.count) && item.count > 0)) throw new RangeError(`Count must be a whole number above zero: ${item.count}`)
    const { meanLb, sdLb } = itemWeight(item)
    total.itemCount += item.count
    total.typicalLb += item.count * item.typicalLb
    total.meanLb += item.count * meanLb
    total.variance += item.count * sdLb ** 2
    if (item.weightSource === 'weighed') total.weighedLb += item.count * meanLb
    else total.unweighedLb += item.count * meanLb
  }
  const { variance, ...sums } = total
  const sdLb = Math.sqrt(variance + (SHARED_BIAS_SHARE * total.unweighedLb) ** 2)
  return { ...sums, sdLb, lowLb: Math.max(0, total.meanLb - Z_95 * sdLb), highLb: total.meanLb + Z_95 * sdLb }
}

/** Chance, 0 to 1, that the true total is above a limit, the total taken as normal. */
export function chanceOfExceeding(total: Pick<InventoryTotal, 'meanLb' | 'sdLb'>, limitLb: number): number {
  if (!(Number.isFinite(limitLb) && limitLb >= 0)) throw new RangeError(`Limit must be zero or more: ${limitLb}`)
  if (total.sdLb === 0) return total.meanLb > limitLb ? 1 : 0
  return normalBelow((total.meanLb - limitLb) / total.sdLb)
}
