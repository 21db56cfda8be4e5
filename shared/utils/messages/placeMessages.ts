import type { Places } from '../structure/whereMayItGo'
import { formatLength, formatShare, type UnitSystem } from '../units'

type Spot = Extract<Places, { kind: 'places' }>['spots'][number]

/** 'at a bearing wall, 3 ft from joist 1: 71 % of the joists’ rating'. */
export function spotWords(spot: Pick<Spot, 'fromWallFt' | 'yFt' | 'utilisation'>, system: UnitSystem = 'us'): string {
  const wall = spot.fromWallFt < 0.05 ? 'at a bearing wall' : `${formatLength(spot.fromWallFt, system)} from a bearing wall`
  return `${wall}, ${formatLength(spot.yFt, system)} from joist 1: ${formatShare(spot.utilisation)} of the joists’ rating`
}

/** Why no place is offered; null when there is one. */
export function noPlaceSentence(places: Places): string | null {
  switch (places.kind) {
    case 'nothing-allowed': return 'Nothing may be stored here.'
    case 'larger-than-field': return 'It is larger than this group of joists.'
    case 'refused': return null
    case 'places': {
      if (places.best.length > 0) return null
      if (places.totalRatio > 1) return 'With it, these joists would carry more than their rated total. Take something out first.'
      const held = places.spots.filter(spot => spot.state !== 'over')
      if (held.length === 0) return 'No place over these joists takes it within the rating. Leave it out, or part of it.'
      if (held.every(spot => spot.heavyInMiddle)) return 'Wherever it stands it reaches into the middle half of the span, where it presses more than the rating. Make it shorter along the joists, or spread it wider.'
      return 'Every place that would take it is taken. Move something first.'
    }
  }
}
