import type { ObservationAnswers } from '../../types/mark'
import type { ResponseClass } from '../upkeep/responseTimes'
import { dangerSignsIn } from './impliedDanger'

/** Which response time a report starts. Ours: what hangs, is damp or keeps a door from closing does not wait a month. */
export function reportClass(answers: ObservationAnswers): ResponseClass {
  if (dangerSignsIn(answers).length > 0) return 'danger'
  const urgent = answers.kind === 'sag' || answers.stain === 'damp' || answers.doors === 'will-not-close' || answers.sounds === 'once'
  return urgent ? 'urgent' : 'routine'
}
