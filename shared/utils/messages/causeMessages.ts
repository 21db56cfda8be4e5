import type { Cause, CauseClue, CauseUrgency } from '../movement/causeClues'
import { CLUE_CAVEAT } from './safety'

const CAUSE_WORDS: Record<Cause, string> = {
  'truss-uplift': 'Roof trusses may arch in cold months and lift the ceiling off the walls between rooms. Such gaps open in winter and close in summer.',
  'board-joint': 'It may follow a joint between two boards. Such lines open in wet months and come back after a repair.',
  'fastener-pop': 'Lumber that dries pushes nails and screws out, most often in the first heating season.',
  'board-letting-go': 'The board may be letting go of the joists. That can come suddenly, with a cracking sound.',
  'overload': 'What is stored above, or wet or heavy insulation, may be too much for the joists.',
  'water-leak': 'Water may be coming in from the roof, a bath or a pipe.',
  'plaster-keys': 'Old plaster may be losing the keys that hold it to the lath. It can fall with little warning.',
  'house-movement': 'The house may be moving, with the seasons or for good. Look whether doors stick.',
  'vibration': 'Shaking rarely makes a crack by itself. It can lengthen one that is there.',
  'altered-framing': 'A wall taken out or a joist cut may have left the ceiling without support.',
  'season-only': 'Hairlines open and close with heat and damp, with no growth over a year.',
  'patch-returning': 'It has come back through a repair. The cause was not mended.',
}

const URGENCY_WORDS: Record<CauseUrgency, string> = {
  'watch-a-year': 'Read it through one full year.',
  'watch': 'Keep reading it.',
  'look': 'Have somebody look.',
  'urgent-if-growing': 'Urgent if it grows.',
  'urgent': 'Urgent: have it looked at now.',
}

export function clueSentence(clue: CauseClue): string {
  return `${CAUSE_WORDS[clue.cause]} ${URGENCY_WORDS[clue.urgency]} ${CLUE_CAVEAT} Source: ${clue.source}.`
}
