import type { NeighbourControl, NeighbourMovement } from '../movement/neighbourControl'
import { formatDay } from '../days'
import { countWords } from './activityMessages'

/** Shown with the comparison. */
export const NEIGHBOUR_CAVEAT = 'What moves in the same months may share a cause or not. This is a comparison, not a diagnosis.'

export const NEIGHBOUR_WORDS: Record<NeighbourMovement, string> = {
  'same-way': 'Moves the same way', 'other-way': 'Moves the other way', 'still': 'Does not move like it', 'cannot-tell': 'Cannot tell',
}

type Compared = Pick<NeighbourControl, 'verdict' | 'fromOn' | 'untilOn'> & { neighbours: readonly { movement: NeighbourMovement }[] }

/** Whether other ceilings of the house moved in the same months, in one or two sentences. */
export function neighbourSentence({ verdict, neighbours, fromOn, untilOn }: Compared): string {
  const told = neighbours.filter(({ movement }) => movement !== 'cannot-tell').length
  const along = neighbours.filter(({ movement }) => movement === 'same-way').length
  const when = fromOn && untilOn ? ` from ${formatDay(fromOn)} to ${formatDay(untilOn)}` : ''
  switch (verdict) {
    case 'does-not-move': return 'This mark does not move beyond the error of its readings, so there is nothing to compare.'
    case 'cannot-tell': return neighbours.length === 0
      ? 'No mark of this kind on another ceiling of the house has been read often enough to compare.'
      : 'The readings do not tell yet whether other ceilings of the house moved in the same months.'
    case 'moves-alone': return `Of ${countWords(told, 'mark')} on other ceilings that can be compared${when}, none moved the same way. That speaks for something at this place rather than for the weather or the house.`
    case 'moves-with-others': return `${along} of ${countWords(told, 'mark')} on other ceilings moved the same way${when}. That speaks for the season, the weather or the house rather than for what lies above this one.`
    case 'some-move-too': return `${along} of ${countWords(told, 'mark')} on other ceilings moved the same way${when}. That speaks neither for nor against a cause of its own.`
  }
}
