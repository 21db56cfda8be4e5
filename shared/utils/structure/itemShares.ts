import type { LoadField, PlacedItem } from '../../types/loadPlan'
import type { BeamLoad } from './spanTrace'

export interface JoistShare { joist: number, share: number }

/** Integral of the hat 1 − |η| from −1 to `eta`, in joist spacings. */
function hatIntegral(eta: number): number {
  if (eta <= -1) return 0
  if (eta >= 1) return 1
  return eta < 0 ? (1 + eta) ** 2 / 2 : 1 - (1 - eta) ** 2 / 2
}

/**
 * Which joists carry an item, and how much of it: the deck as hinged strips between joists, so that a strip of load
 * goes to its two neighbours by the lever rule. Shares of an item inside the field sum to 1.
 */
export function itemShares(field: Pick<LoadField, 'spacingIn' | 'joistCount'>, item: Pick<PlacedItem, 'yFt' | 'widthFt'>): JoistShare[] {
  const from = item.yFt * 12 / field.spacingIn
  const width = item.widthFt * 12 / field.spacingIn
  const first = Math.max(0, Math.floor(from))
  const last = Math.min(field.joistCount - 1, Math.ceil(from + width))
  const shares: JoistShare[] = []
  for (let joist = first; joist <= last; joist++) {
    const share = (hatIntegral(from + width - joist) - hatIntegral(from - joist)) / width
    if (share > 0) shares.push({ joist, share })
  }
  return shares
}

/** An item as a line load on one joist, for its share of the weight. */
export function lineLoad(field: Pick<LoadField, 'spanFt'>, item: PlacedItem, share: number): BeamLoad {
  return { kind: 'uniform', lbPerFt: item.weightLb * share / item.lengthFt, fromFt: Math.max(0, item.xFt), toFt: Math.min(field.spanFt, item.xFt + item.lengthFt) }
}

/** The loads on each joist of the field from all items. */
export function joistLoads(field: LoadField, items: PlacedItem[]): BeamLoad[][] {
  const loads: BeamLoad[][] = Array.from({ length: field.joistCount }, () => [])
  for (const item of items) {
    if (item.weightLb === 0) continue
    for (const { joist, share } of itemShares(field, item)) loads[joist]?.push(lineLoad(field, item, share))
  }
  return loads
}
