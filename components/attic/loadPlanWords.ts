import { loadWords } from '../house/sectionWords'
import { joistsUnder, nearerWall } from './loadPlanGeometry'
import type { LoadPlanField, LoadPlanItem, LoadPlanWalls } from './loadPlanTypes'

interface Formatters { weight: (lb: number) => string, length: (ft: number) => string }

/** 'joist 9', 'joists 8 to 10'. */
export function joistWords(field: LoadPlanField, item: LoadPlanItem): string {
  const { from, to } = joistsUnder(field, item)
  return from === to ? `joist ${from}` : `joists ${from} to ${to}`
}

/** 'against the south wall', '9 ft from the south wall'. */
export function wallWords(field: LoadPlanField, walls: LoadPlanWalls, item: LoadPlanItem, { length }: Pick<Formatters, 'length'>): string {
  const { wall, distanceFt } = nearerWall(field, item)
  return distanceFt < 0.05 ? `against the ${walls[wall]}` : `${length(distanceFt)} from the ${walls[wall]}`
}

/** 'near', or 'too dense here', which goes before what the joists say. */
export const stateWordOf = (item: Pick<LoadPlanItem, 'state' | 'dense'>): string => item.dense ? 'too dense here' : loadWords[item.state]
export const toneOf = (item: Pick<LoadPlanItem, 'state' | 'dense'>): LoadPlanItem['state'] => item.dense ? 'over' : item.state

/** Everything the drawing shows of one item, as its name for those who do not see it. */
export function itemWords(field: LoadPlanField, walls: LoadPlanWalls, item: LoadPlanItem, format: Formatters): string {
  return `${item.name}, ${format.weight(item.weightLb)}, ${loadWords[item.state]}${item.dense ? ', too dense for the middle' : ''}: ${wallWords(field, walls, item, format)}, on ${joistWords(field, item)}`
}
