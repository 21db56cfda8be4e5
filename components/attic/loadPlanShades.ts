import type { Spot } from '~/shared/utils/structure/whereMayItGo'
import { fieldDepthFt } from './loadPlanGeometry'
import type { LoadPlanField, LoadPlanShade } from './loadPlanTypes'

const toneOf = (spot: Spot): LoadPlanShade['tone'] | null => spot.state === 'over' || spot.heavyInMiddle ? 'over' : spot.state === 'near' ? 'near' : null

/** Half way to each neighbour, so that the stretches around grid points touch. */
function boundsOf(places: readonly number[]): [number, number][] {
  return places.map((place, index) => {
    const [before, after] = [places[index - 1], places[index + 1]]
    return [before === undefined ? place : (before + place) / 2, after === undefined ? place : (place + after) / 2]
  })
}

const distinct = (values: number[]) => [...new Set(values)].sort((a, b) => a - b)

/** Where the middle of an item would be near or over, as stretches along the joists in shares of the plan. */
export function shadesOf(field: LoadPlanField, spots: readonly Spot[], size: { lengthFt: number, widthFt: number }): LoadPlanShade[] {
  const [xs, ys] = [distinct(spots.map(spot => spot.xFt)), distinct(spots.map(spot => spot.yFt))]
  const [xBounds, yBounds] = [boundsOf(xs.map(x => x + size.lengthFt / 2)), boundsOf(ys.map(y => y + size.widthFt / 2))]
  const depthFt = Math.max(fieldDepthFt(field), 0.5)
  const columnOf = new Map(xs.map((x, index) => [x, index]))
  return ys.flatMap((y, row) => {
    const tones = xs.map((): LoadPlanShade['tone'] | null => null)
    for (const spot of spots) if (spot.yFt === y) tones[columnOf.get(spot.xFt) ?? 0] = toneOf(spot)
    return runsOf(tones).map(({ tone, from, to }) => {
      const [left, right, top, bottom] = [xBounds[from]![0], xBounds[to]![1], yBounds[row]![0], yBounds[row]![1]]
      return { x: left / field.spanFt, w: (right - left) / field.spanFt, y: top / depthFt, h: (bottom - top) / depthFt, tone }
    })
  })
}

function runsOf<T extends string>(tones: readonly (T | null)[]): { tone: T, from: number, to: number }[] {
  const runs: { tone: T, from: number, to: number }[] = []
  tones.forEach((tone, index) => {
    const last = runs.at(-1)
    if (tone === null) return
    if (last && last.tone === tone && last.to === index - 1) last.to = index
    else runs.push({ tone, from: index, to: index })
  })
  return runs
}
