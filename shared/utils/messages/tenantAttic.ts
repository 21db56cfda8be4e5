import type { AtticOfUnit } from '../../types/home'
import { formatLoad, type UnitSystem } from '../units'

export type AtticCautionCode = 'trusses' | 'hold' | 'unload-first' | 'estimate'

/** What may go into an attic, for a person who lives below it. */
export interface TenantAtticRule { word: string, sentences: string[], cautions: AtticCautionCode[] }

export type RatedAttic = Pick<AtticOfUnit, 'surveyedOn' | 'ratedPsf' | 'onHold' | 'basis' | 'loadState' | 'storedLb'> & { isTrussed: boolean }

const NOTHING = 'Keep nothing in it.'
const ASK = 'Ask your landlord before anything goes up.'
/** Practice: a full carton of books presses about 40 to 49 psf on its base (ours, from weight and size of a carton). */
const BOOK_CARTON_PSF = 40

/** Never a figure for trusses, not even one a paper states: that is for the landlord to explain. */
export function tenantAtticRule(attic: RatedAttic, system: UnitSystem = 'us'): TenantAtticRule {
  const isLoaded = attic.storedLb > 0
  const unload: AtticCautionCode[] = isLoaded ? ['unload-first'] : []
  if (attic.surveyedOn === null || attic.ratedPsf === null) {
    return { word: 'Not surveyed', sentences: ['Nobody has looked yet at what this attic can hold.', NOTHING, ASK], cautions: unload }
  }
  if (attic.onHold) return { word: 'On hold', sentences: [NOTHING], cautions: ['hold', ...unload] }
  if (attic.isTrussed) {
    return attic.ratedPsf > 0
      ? { word: 'Ask first', sentences: ['A paper on file says what these trusses were made for.', ASK], cautions: ['trusses', 'estimate'] }
      : { word: 'No storage', sentences: [NOTHING], cautions: ['trusses', ...unload] }
  }
  if (attic.ratedPsf <= 0) return { word: 'No storage', sentences: ['Nothing may be stored in this attic.', NOTHING], cautions: [...unload, 'estimate'] }
  return ratedRule(attic, attic.ratedPsf, system)
}

function ratedRule({ loadState }: RatedAttic, ratedPsf: number, system: UnitSystem): TenantAtticRule {
  if (loadState === 'over') return { word: 'Over', sentences: ['It holds more than it is rated for.', 'Put nothing more up.'], cautions: ['unload-first', 'estimate'] }
  const spread = `At most ${formatLoad(ratedPsf, system)}, spread out: light things, side by side, near the walls that carry the ceiling.`
  const books = `A full carton of books alone presses ${formatLoad(BOOK_CARTON_PSF, system)} or more where it stands.`
  return {
    word: loadState === 'near' ? 'Nearly full' : 'Light things only',
    sentences: [...loadState === 'near' ? ['It is near what it is rated for. Add nothing more.'] : [], spread, books, ASK],
    cautions: ['estimate'],
  }
}
