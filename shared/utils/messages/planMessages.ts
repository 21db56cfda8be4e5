import type { LoadState, PlanLimit } from '../../types/loadPlan'
import type { StrongbackOpinion } from '../structure/strongbackOpinion'
import type { SuggestedMove, SuggestedMoves } from '../structure/suggestMoves'
import { formatDay } from '../days'
import { formatLength, formatShare, formatWeight, type UnitSystem } from '../units'
import { LIMIT_WORDS } from './ratingReasons'

export const PLAN_LIMIT_WORDS: Record<PlanLimit, string> = { moment: LIMIT_WORDS.bending, deflection: LIMIT_WORDS.deflection, shear: LIMIT_WORDS.shear, bearing: LIMIT_WORDS.bearing }
export const LOAD_STATE_WORDS: Record<LoadState, string> = { within: 'within', near: 'near', over: 'over' }

/** 'at the left wall', '3 ft from the right wall'. */
export function fromWallWords(spot: { xFt: number, lengthFt: number }, spanFt: number, system: UnitSystem = 'us'): string {
  const toEnd = spanFt - spot.xFt - spot.lengthFt
  const [wall, ft] = spot.xFt <= toEnd ? ['left wall', spot.xFt] as const : ['right wall', Math.max(0, toEnd)] as const
  return ft < 0.05 ? `at the ${wall}` : `${formatLength(ft, system)} from the ${wall}`
}

/** One suggested move in words: 'Carton of books, turned, at the left wall, 4 ft from joist 1'. */
export function moveWords(name: string, move: Pick<SuggestedMove, 'turned' | 'xFt' | 'yFt' | 'lengthFt'>, spanFt: number, system: UnitSystem = 'us'): string {
  return `${name}${move.turned ? ', turned' : ''}, ${fromWallWords(move, spanFt, system)}, ${formatLength(move.yFt, system)} from joist 1`
}

export const afterMoveWords = (move: Pick<SuggestedMove, 'state' | 'utilisation'>): string => `then ${LOAD_STATE_WORDS[move.state]}, ${formatShare(move.utilisation)}`

/** Why no move is offered; null where there is one, or nothing to mend. */
export function noMoveSentence(answer: SuggestedMoves, system: UnitSystem = 'us'): string | null {
  switch (answer.kind) {
    case 'too-much': return `Wherever things stand, these joists carry ${formatWeight(answer.overLb, system)} more than their rated total. Take at least that much out first.`
    case 'no-better-place': return 'No single move mends this. Take something heavy out, or split it into smaller piles along the walls.'
    case 'nothing-allowed': return 'Nothing may be stored here. Take everything out.'
    default: return null
  }
}

/** Whether sharing by strongbacks counts, and why not. */
export function strongbackSentence(opinion: StrongbackOpinion, counts: boolean): string {
  if (counts) return opinion.kind === 'accepted' ? `The letter of ${formatDay(opinion.writtenOn)} by ${opinion.writtenBy} lets the strongbacks share, so this counts in the verdict.` : 'An engineer lets the strongbacks share, so this counts in the verdict.'
  if (opinion.kind === 'accepted') return 'An engineer’s letter lets strongbacks share, but the survey does not say that these are sound. So this is shown beside the verdict and does not count.'
  if (opinion.kind === 'none') return 'No engineer’s letter on file lets the strongbacks share the load. So this is shown beside the verdict and does not count. A ceiling of gypsum board never counts.'
  const why = {
    'not-attached': 'has no paper attached', 'covers-part': 'covers only a part of the attic', 'before-survey': 'is older than the survey, so its writer may have seen something else',
  }[opinion.why]
  return `The letter of ${formatDay(opinion.writtenOn)} by ${opinion.writtenBy} ${why}. So this is shown beside the verdict and does not count.`
}
