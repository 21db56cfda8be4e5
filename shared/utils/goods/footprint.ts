import type { CatalogueItem } from '../../types/item'
import { CARTONS } from './goodsDensities'

export interface Footprint { lengthFt: number, widthFt: number, heightFt: number, basis: 'carton' | 'volume' | 'unknown' }

const CARTON_BY_VOLUME = new Map(CARTONS.map(carton => [carton.volumeFt3, carton]))

/** Ours, where a row has no volume: a smallish square, so that the pressure is not made to look low. */
const UNKNOWN_SIDE_FT = 1.5

/**
 * A first footprint for a catalogue row, to be corrected by the person: the trade's carton where the volume is one,
 * else a cube of the row's volume, which errs on the small side for furniture.
 */
export function suggestFootprint(item: Pick<CatalogueItem, 'category' | 'volumeFt3'>): Footprint {
  const carton = item.category === 'boxes' && item.volumeFt3 !== null ? CARTON_BY_VOLUME.get(item.volumeFt3) : undefined
  if (carton) return { lengthFt: carton.lengthIn / 12, widthFt: carton.widthIn / 12, heightFt: carton.heightIn / 12, basis: 'carton' }
  if (item.volumeFt3 === null) return { lengthFt: UNKNOWN_SIDE_FT, widthFt: UNKNOWN_SIDE_FT, heightFt: UNKNOWN_SIDE_FT, basis: 'unknown' }
  const side = Math.cbrt(item.volumeFt3)
  return { lengthFt: side, widthFt: side, heightFt: side, basis: 'volume' }
}

/** Weight over the area it stands on, psf. */
export function pressurePsf(weightLb: number, lengthFt: number, widthFt: number): number {
  if (!(lengthFt > 0 && widthFt > 0)) throw new RangeError(`Footprint must be above zero: ${lengthFt} × ${widthFt}`)
  return weightLb / (lengthFt * widthFt)
}
