import { DANGER_SIGNS, type DangerSign, type ObservationAnswers } from '../../types/mark'

export type DangerAnswers = Pick<ObservationAnswers, 'kind' | 'shape' | 'stain' | 'doors' | 'sounds' | 'recentEvents' | 'dangerSigns' | 'popCount'>

/** Ours: this many bumps in one row are a line. */
const POPS_IN_A_LINE = 3

/**
 * The danger signs ticked, and those the other answers amount to. Errs on the safe side: a person who says that a
 * hanging ceiling is damp has reported one that is wet and bulging, whether or not that box was ticked.
 */
export function dangerSignsIn(answers: DangerAnswers): DangerSign[] {
  const found = new Set<DangerSign>(answers.dangerSigns)
  const wet = answers.stain === 'damp' || answers.stain === 'dripping'
  if (answers.stain === 'dripping') found.add('water-dripping')
  if (answers.kind === 'sag' && wet) found.add('wet-and-bulging')
  if (answers.kind === 'sag' && answers.shape === 'round-bulge') found.add('bulge-or-growing-sag')
  if (answers.sounds === 'repeated') found.add('sounds-with-change')
  if (answers.doors === 'will-not-close' && answers.kind === 'crack') found.add('opening-while-doors-bind')
  if (answers.kind === 'nail-pops' && answers.shape === 'bumps-in-a-row' && (answers.popCount ?? 0) >= POPS_IN_A_LINE && answers.sounds !== 'none') {
    found.add('pops-in-a-line-together')
  }
  if (answers.recentEvents.includes('impact') || answers.recentEvents.includes('earthquake')) found.add('after-an-impact')
  return DANGER_SIGNS.filter(sign => found.has(sign))
}
