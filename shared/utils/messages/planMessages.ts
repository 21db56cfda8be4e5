import type { LoadPlanProblem, LoadPlanProblemCode, LoadState, PlanLimit } from '../../types/loadPlan'
import type { StrongbackOpinion } from '../structure/strongbackOpinion'
import type { SuggestedMove, SuggestedMoves } from '../structure/suggestMoves'
import { formatDay } from '../days'
import { formatInches, formatLength, formatNumber, formatShare, formatWeight, type UnitSystem } from '../units'
import { LIMIT_WORDS } from './ratingReasons'

export const PLAN_LIMIT_WORDS: Record<PlanLimit, string> = { moment: LIMIT_WORDS.bending, deflection: LIMIT_WORDS.deflection, shear: LIMIT_WORDS.shear, bearing: LIMIT_WORDS.bearing }
export const LOAD_STATE_WORDS: Record<LoadState, string> = { within: 'within', near: 'near', over: 'over' }

/** 'at the left wall', '3 ft from the right wall'. */
export function fromWallWords(spot: { xFt: number, lengthFt: number }, spanFt: number, system: UnitSystem = 'us'): string {
  const toEnd = spanFt - spot.xFt - spot.lengthFt
  const [wall, ft] = spot.xFt <= toEnd ? ['left wall', spot.xFt] as const : ['right wall', Math.max(0, toEnd)] as const
  return ft < 0.05 ? `at the ${wall}` : `${formatLength(ft, system)} from the ${wall}`
}

/** 'at the left wall, 3 ft from joist 1: 71 % of the joists’ rating'. */
export function placeWords(spot: { xFt: number, yFt: number, lengthFt: number, utilisation: number }, spanFt: number, system: UnitSystem = 'us'): string {
  return `${fromWallWords(spot, spanFt, system)}, ${formatLength(spot.yFt, system)} from joist 1: ${formatShare(spot.utilisation)} of the joists’ rating`
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

const MEASURE_WORDS: Record<string, string> = {
  spanFt: 'the clear span', spacingIn: 'the spacing of the joists', joistCount: 'the number of joists', ratedPsf: 'the rating', joistEiLbIn2: 'the stiffness of the joists',
  atFt: 'the place of the strongback', eiLbIn2: 'the stiffness of the strongback', weightLb: 'its weight', xFt: 'its place along the joists', yFt: 'its place across the joists',
  lengthFt: 'its length', widthFt: 'its width',
}

/** What keeps a plan from being worked out, and where to mend it. `names` holds the items' by their ids. */
export function planProblemSentence(problem: LoadPlanProblem, names: ReadonlyMap<string, string>, system: UnitSystem = 'us'): string {
  const { at, measure, limit } = problem
  const what = MEASURE_WORDS[measure] ?? measure
  const name = at.part === 'item' ? `${names.get(at.id) ?? 'Something'}: ` : ''
  const length = (ft: number | null) => formatLength(ft ?? 0, system)
  const sentences: Record<LoadPlanProblemCode, string> = {
    'not-positive': `${what} has to be a number above zero.`,
    'negative': `${what} has to be a number, and not below zero.`,
    'not-whole': `${what} has to be a whole number.`,
    'too-few-joists': 'there have to be two joists at least.',
    'too-many-joists': `more than ${formatNumber(limit ?? 0)} joists are never calculated.`,
    'span-too-long': `a span above ${length(limit)} is never calculated. Is it in the right unit?`,
    'spacing-not-plausible': `joists do not stand ${formatInches(problem.value, system)} apart. Is it in the right unit?`,
    'outside-field': measure === 'xFt' ? `it sticks out past the wall; the span is ${length(limit)}.` : `it sticks out past the last joist; they reach ${length(limit)}.`,
    'outside-span': 'a strongback has to lie between the two walls.',
  }
  // Before the first wall or joist there is no extent to tell.
  const sentence = problem.code === 'outside-field' && limit === 0 ? `it stands before the first ${measure === 'xFt' ? 'wall' : 'joist'}.` : sentences[problem.code]
  return name ? `${name}${sentence}` : sentence.charAt(0).toUpperCase() + sentence.slice(1)
}
