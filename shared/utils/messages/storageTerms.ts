import type { StorageTerms } from '../../types/storageTerms'
import type { UnitSystem } from '../units'
import { ATTIC_WORK, ESTIMATE_CAVEAT, HOLD_CAUTION, TRUSS_CAUTION, UNLOAD_FIRST } from './safety'
import { tenantAtticRule, type AtticCautionCode, type RatedAttic } from './tenantAttic'

const CAUTIONS: Record<AtticCautionCode, string> = { 'trusses': TRUSS_CAUTION, 'hold': HOLD_CAUTION, 'unload-first': UNLOAD_FIRST, 'estimate': ESTIMATE_CAVEAT }

/** Common practice, no source: what does not belong into any attic, and how to use one. */
const ALWAYS = [
  'Nothing that burns or gives off fumes: no fuel, paint, solvent, gas bottle or fireworks.',
  'No water: no tank, water bed or full container.',
  'No safe, engine, piano, tile, cement or other building material.',
  'Nothing rests on the ceiling board between the joists.',
  'Hatch, vents, lamps and wiring stay free.',
  'Tell the landlord what is put up or taken out, and look through the list when asked.',
  'Report a new crack, sag or stain below the attic at once, and put nothing more up until somebody has looked.',
]

/** What somebody who stores things in this attic agrees to; it follows the attic as it was last judged. */
export function storageTerms(attic: RatedAttic & { name: string }, system: UnitSystem = 'us'): StorageTerms {
  const { word, sentences, cautions } = tenantAtticRule(attic, system)
  return { title: `${attic.name}: ${word}`, rules: [...sentences, ...ALWAYS], cautions: [...new Set([...cautions.map(code => CAUTIONS[code]), ATTIC_WORK])] }
}

/** Signed terms hold as long as every sentence is the same. */
export const isSameTerms = (a: StorageTerms, b: StorageTerms) =>
  a.title === b.title && a.rules.join('\n') === b.rules.join('\n') && a.cautions.join('\n') === b.cautions.join('\n')
