import type { AtticSurvey } from '../../types/attic'
import type { JoistAssumption } from '../../types/atticRating'
import {
  BOARD_INSULATION_LIMITS, CEILING_PSF, DEAD_PSF_WITHOUT_STORAGE, DEAD_PSF_WITH_STORAGE, DECK_PSF,
  INSULATION_DEPTH_ASSUMED_IN, INSULATION_PSF_PER_IN, LUMBER_LB_PER_FT3,
} from './deadLoadValues'

export type AtticBuildUp = Pick<AtticSurvey, 'ceilingFinish' | 'insulation' | 'deck'>

export interface DeadLoad {
  /** Taken in the calculation. */
  psf: number
  ceilingPsf: number
  insulationPsf: number
  deckPsf: number
  joistsPsf: number
  assumptions: JoistAssumption[]
}

/** Joists' own weight spread over the ceiling, psf. */
export function joistsPsf(breadthIn: number, depthIn: number, spacingIn: number): number {
  return LUMBER_LB_PER_FT3 * breadthIn * depthIn / (12 * spacingIn)
}

export function insulationPsf(insulation: AtticSurvey['insulation']): { psf: number, assumed: boolean } {
  const row = INSULATION_PSF_PER_IN[insulation.material]
  if (insulation.material === 'none') return { psf: 0, assumed: false }
  const measured = insulation.depthIn !== null && insulation.depthIn >= 0
  return { psf: row.psf * (measured ? insulation.depthIn ?? 0 : INSULATION_DEPTH_ASSUMED_IN), assumed: row.assumed || !measured }
}

/**
 * Dead load by build-up. Where any part had to be assumed, at least the allowance of the IRC span tables:
 * 5 psf without storage, 10 psf with.
 */
export function deadLoad(
  buildUp: AtticBuildUp, joist: { fieldName: string, breadthIn: number, depthIn: number, spacingIn: number }, withStorage: boolean,
): DeadLoad {
  const { fieldName } = joist
  const ceiling = CEILING_PSF[buildUp.ceilingFinish]
  const insulation = insulationPsf(buildUp.insulation)
  const deckPsf = buildUp.deck === 'none' ? 0 : DECK_PSF
  const parts = { ceilingPsf: ceiling.psf, insulationPsf: insulation.psf, deckPsf, joistsPsf: joistsPsf(joist.breadthIn, joist.depthIn, joist.spacingIn) }
  const assumptions: JoistAssumption[] = []
  if (ceiling.assumed) assumptions.push({ code: 'dead-load-part-assumed', part: 'ceiling', psf: ceiling.psf, fieldName })
  if (insulation.assumed) assumptions.push({ code: 'dead-load-part-assumed', part: 'insulation', psf: insulation.psf, fieldName })
  if (buildUp.deck === 'unknown') assumptions.push({ code: 'dead-load-part-assumed', part: 'deck', psf: deckPsf, fieldName })
  const builtUpPsf = parts.ceilingPsf + parts.insulationPsf + parts.deckPsf + parts.joistsPsf
  const allowancePsf = withStorage ? DEAD_PSF_WITH_STORAGE : DEAD_PSF_WITHOUT_STORAGE
  if (assumptions.length === 0 || builtUpPsf >= allowancePsf) return { psf: builtUpPsf, ...parts, assumptions }
  assumptions.push({ code: 'dead-load-floor', builtUpPsf, takenPsf: allowancePsf, fieldName })
  return { psf: allowancePsf, ...parts, assumptions }
}

/** Insulation a ceiling board can carry between joists, psf; null for finishes without such a limit. */
export function boardInsulationLimitPsf(finish: AtticSurvey['ceilingFinish'], spacingIn: number): number | null {
  const { thinWidePsf, otherPsf, narrowSpacingIn } = BOARD_INSULATION_LIMITS
  if (finish === 'gypsum-five-eighths') return otherPsf
  if (finish === 'gypsum-half-inch') return spacingIn <= narrowSpacingIn ? otherPsf : thinWidePsf
  return null
}
