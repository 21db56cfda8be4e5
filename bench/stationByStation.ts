import type { JoistMember, LoadField, PlacedItem } from '../shared/types/loadPlan.ts'

/**
 * The plain way to the same answers: loads gathered inch by inch, summed once for shear, again for moment, again for
 * slope and sag. The bench holds the exact sums against it for speed, the tests for truth.
 */

const STATIONS_PER_FT = 12

export interface StationEffects { momentLbFt: number, deflectionLbFt3: number, shearLb: number, reactionLb: number }

/** The lever rule of a hinged deck, strip by strip across the item. */
function shareOnJoist(field: LoadField, item: PlacedItem, joist: number): number {
  const strips = Math.max(24, Math.ceil(item.widthFt * 48))
  const spacingFt = field.spacingIn / 12
  let share = 0
  for (let strip = 0; strip < strips; strip++) {
    const yFt = item.yFt + item.widthFt * (strip + 0.5) / strips
    share += Math.max(0, 1 - Math.abs(yFt / spacingFt - joist)) / strips
  }
  return share
}

function loadsAlong(field: LoadField, items: readonly PlacedItem[], joist: number): Float64Array {
  const count = Math.ceil(field.spanFt * STATIONS_PER_FT)
  const h = field.spanFt / count
  const lb = new Float64Array(count)
  for (const item of items) {
    const lbPerFt = item.weightLb * shareOnJoist(field, item, joist) / item.lengthFt
    for (let i = 0; i < count; i++) {
      const overlapFt = Math.min(item.xFt + item.lengthFt, (i + 1) * h) - Math.max(item.xFt, i * h)
      if (overlapFt > 0) lb[i]! += lbPerFt * overlapFt
    }
  }
  return lb
}

/** One joist under everything on the field. Each station's load stands spread over its inch. */
export function stationJoist(field: LoadField, items: readonly PlacedItem[], joist: number, sectionFt = 0): StationEffects {
  const lb = loadsAlong(field, items, joist)
  const count = lb.length
  const h = field.spanFt / count
  const endLb = lb.reduce((sum, each, i) => sum + each * (i + 0.5) * h, 0) / field.spanFt
  const startLb = lb.reduce((sum, each) => sum + each, 0) - endLb
  const moments = new Float64Array(count + 1)
  let shear = startLb
  let greatestShear = 0
  for (let i = 0; i < count; i++) {
    const after = shear - lb[i]!
    if (i * h >= sectionFt - 1e-9 && (i + 1) * h <= field.spanFt - sectionFt + 1e-9) greatestShear = Math.max(greatestShear, Math.abs(shear), Math.abs(after))
    moments[i + 1] = moments[i]! + (shear + after) / 2 * h
    shear = after
  }
  return { momentLbFt: Math.max(...moments), deflectionLbFt3: sagOf(moments, h), shearLb: greatestShear, reactionLb: Math.max(startLb, endLb) }
}

function sagOf(moments: Float64Array, h: number): number {
  const sag = new Float64Array(moments.length)
  let slope = 0
  for (let i = 1; i < moments.length; i++) {
    const before = slope
    slope -= (moments[i - 1]! + moments[i]!) / 2 * h
    sag[i] = sag[i - 1]! + (before + slope) / 2 * h
  }
  const last = sag.length - 1
  const tilt = sag[last]! / last
  return sag.reduce((most, each, i) => Math.max(most, each - tilt * i), 0)
}

export function stationPlan(field: LoadField, items: readonly PlacedItem[]): { momentRatio: number, deflectionRatio: number }[] {
  const lbPerFt = field.ratedPsf * field.spacingIn / 12
  return Array.from({ length: field.joistCount }, (_, joist) => {
    const { momentLbFt, deflectionLbFt3 } = stationJoist(field, items, joist)
    return { momentRatio: momentLbFt / (lbPerFt * field.spanFt ** 2 / 8), deflectionRatio: deflectionLbFt3 / (5 * lbPerFt * field.spanFt ** 4 / 384) }
  })
}

/** The most used joist under an item that would stand here, everything summed anew. */
export function stationSpot(field: LoadField, items: readonly PlacedItem[], item: PlacedItem, member: JoistMember): number {
  const all = [...items, item]
  const spacingFt = field.spacingIn / 12
  const lbPerFt = field.ratedPsf * spacingFt
  const sectionFt = Math.min(member.depthIn / 12, field.spanFt / 4)
  const deadLbPerFt = member.deadPsf * spacingFt
  let most = 0
  for (let joist = 0; joist < field.joistCount; joist++) {
    if (shareOnJoist(field, item, joist) === 0) continue
    const { momentLbFt, deflectionLbFt3, shearLb, reactionLb } = stationJoist(field, all, joist, sectionFt)
    most = Math.max(
      most, momentLbFt / (lbPerFt * field.spanFt ** 2 / 8), deflectionLbFt3 / (5 * lbPerFt * field.spanFt ** 4 / 384),
      shearLb / (member.shearLb - deadLbPerFt * (field.spanFt / 2 - sectionFt)), reactionLb / (member.bearingLb - deadLbPerFt * field.spanFt / 2),
    )
  }
  return most
}

/** Where-may-it-go the plain way: every half foot, every joist under it, every load, every inch. */
export function stationMap(field: LoadField, items: readonly PlacedItem[], item: Omit<PlacedItem, 'id' | 'xFt' | 'yFt'>, member: JoistMember): number[] {
  const found: number[] = []
  const widthFt = (field.joistCount - 1) * field.spacingIn / 12
  for (let yFt = 0; yFt + item.widthFt <= widthFt + 1e-9; yFt += 0.5) {
    for (let xFt = 0; xFt + item.lengthFt <= field.spanFt + 1e-9; xFt += 0.5) found.push(stationSpot(field, items, { ...item, id: 'new', xFt, yFt }, member))
  }
  return found
}
