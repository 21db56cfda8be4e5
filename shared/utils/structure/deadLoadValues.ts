import type { CeilingFinish, InsulationMaterial } from '../../types/attic'

const ASCE = 'ASCE 7 Table C3.1-1'
const ASCE_MEMORY = 'ASCE 7 Table C3.1-1, from memory'
const OURS = 'ours, on the safe side'

/** Weight of the ceiling below the joists, psf. Unknown and other finishes are taken as plaster. */
export const CEILING_PSF: Record<CeilingFinish, { psf: number, source: string, assumed: boolean }> = {
  'gypsum-half-inch': { psf: 2.2, source: ASCE, assumed: false },
  'gypsum-five-eighths': { psf: 2.75, source: ASCE, assumed: false },
  'plaster-on-lath': { psf: 8, source: ASCE, assumed: false },
  'wood-boards': { psf: 3, source: `${ASCE_MEMORY} (3/4 in boards)`, assumed: false },
  'other': { psf: 8, source: OURS, assumed: true },
  'unknown': { psf: 8, source: OURS, assumed: true },
}

/** Weight of insulation, psf per inch of depth. */
export const INSULATION_PSF_PER_IN: Record<InsulationMaterial, { psf: number, source: string, assumed: boolean }> = {
  'none': { psf: 0, source: 'no insulation', assumed: false },
  'fiberglass': { psf: 0.083, source: 'gypsum construction handbook (manufacturer)', assumed: false },
  'cellulose': { psf: 0.25, source: 'gypsum construction handbook (manufacturer)', assumed: false },
  'rock-wool': { psf: 0.25, source: 'gypsum construction handbook (manufacturer)', assumed: false },
  'foam-board': { psf: 0.5, source: `${ASCE_MEMORY} (urethane foam with skin, the heavier foam)`, assumed: false },
  'other': { psf: 0.25, source: OURS, assumed: true },
  'unknown': { psf: 0.25, source: OURS, assumed: true },
}

/** Depth taken when the insulation was not measured; ours. */
export const INSULATION_DEPTH_ASSUMED_IN = 12

/** A deck of 3/4 in panels; ASCE 7 Table C3.1-1, from memory. A part deck is weighed as a whole one. */
export const DECK_PSF = 2.4

/** Density of joists, lb/ft3, behind the published weights of joists at 16 in (2x6 1.4, 2x8 1.9, 2x10 2.4 psf). */
export const LUMBER_LB_PER_FT3 = 33

/** Allowances of the IRC span tables, R802.5.1(1) and (2), taken when the build-up is not fully known. */
export const DEAD_PSF_WITHOUT_STORAGE = 5
export const DEAD_PSF_WITH_STORAGE = 10

/** Insulation a ceiling board carries between joists before it sags: manufacturers' guidance. */
export const BOARD_INSULATION_LIMITS = { thinWidePsf: 1.3, otherPsf: 2.2, narrowSpacingIn: 16, source: 'gypsum board manufacturers\' guidance' } as const
