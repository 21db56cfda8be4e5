import type { NeighbourAnswer, NeighbourControl } from '../utils/movement/neighbourControl'

export interface NeighbourRow extends NeighbourAnswer {
  number: number
  label: string
  roomName: string
  unitId: string
  unitName: string
  /** Under the same attic, it shares the load: no control for a load there. */
  underSameAttic: boolean
}

/** What GET /api/marks/:id/neighbours answers: marks of the same kind on other ceilings of the house, as far as the asker may see them. */
export interface NeighbourView extends Omit<NeighbourControl, 'neighbours'> { neighbours: NeighbourRow[] }
