/** Things along a line: where each would like its left edge to be, and how wide it is. */
export interface Along { x: number, w: number }

/**
 * Moves things apart so that none overlap and all stay between `from` and `to`, keeping their order and
 * staying as near as it can to where they were. They must fit: the sum of widths and gaps ≤ to − from.
 */
export function spread<T extends Along>(things: readonly T[], from: number, to: number, gap: number): T[] {
  const sorted = things.map(thing => ({ ...thing })).sort((a, b) => a.x + a.w / 2 - (b.x + b.w / 2))
  let edge = from
  for (const thing of sorted) {
    thing.x = Math.max(thing.x, edge)
    edge = thing.x + thing.w + gap
  }
  edge = to
  for (const thing of sorted.toReversed()) {
    thing.x = Math.min(thing.x, edge - thing.w)
    edge = thing.x - gap
  }
  return sorted
}

/** Joins the nearest neighbours until at most `max` are left. */
export function joinNearest<T>(things: readonly T[], max: number, at: (thing: T) => number, join: (a: T, b: T) => T): T[] {
  const left = [...things].sort((a, b) => at(a) - at(b))
  while (left.length > Math.max(1, max)) {
    let nearest = 0
    for (let i = 1; i + 1 < left.length; i++) {
      if (at(left[i + 1]!) - at(left[i]!) < at(left[nearest + 1]!) - at(left[nearest]!)) nearest = i
    }
    left.splice(nearest, 2, join(left[nearest]!, left[nearest + 1]!))
  }
  return left
}
