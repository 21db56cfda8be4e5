import type { PixelPoint } from '../../types/readingDetail'

export type { PixelPoint }

export interface PhotoScale { a: PixelPoint, b: PixelPoint, distanceMm: number }

/** Two points across the crack at one place along it. */
export interface PhotoStation { p: PixelPoint, q: PixelPoint }

export type PhotoWidth
  = | { kind: 'too few stations', needed: number }
    | { kind: 'measured', widthMm: number, sigmaMm: number, stationsMm: number[] }

export const LEAST_STATIONS = 3
/** Ours: each click lands within about a pixel. */
const CLICK_SIGMA_PX = 1
/** Ours: a camera held about 10° off square makes the scale wrong by 1 − cos 10° = 1.5 %. */
const TILT_SHARE = 0.015
/**
 * Ours, from a study on drawn photos: tapped by hand at up to 10° of tilt, 95 % were within 0.35 mm, so σ = 0.35/1.96.
 * Real photos are not better than drawn ones: no photo is taken for surer than that.
 */
const LEAST_SIGMA_MM = 0.18

export function lengthPx(from: PixelPoint, to: PixelPoint): number {
  return Math.hypot(to.xPx - from.xPx, to.yPx - from.yPx)
}

/**
 * Crack width from a photo with a scale in it: distanceMm·|PQ|/|AB|, the mean of at least 3 stations.
 * The clicks across the crack and its own unevenness average out over the stations; the scale's error and the tilt do not.
 * Throws RangeError for a scale without length or a distance not above zero.
 */
export function photoWidth(scale: PhotoScale, stations: readonly PhotoStation[]): PhotoWidth {
  const scalePx = lengthPx(scale.a, scale.b)
  if (!(Number.isFinite(scalePx) && scalePx > 0)) throw new RangeError('The two scale points must be apart')
  if (!(Number.isFinite(scale.distanceMm) && scale.distanceMm > 0)) throw new RangeError('The scale distance must be above zero')
  if (stations.length < LEAST_STATIONS) return { kind: 'too few stations', needed: LEAST_STATIONS }
  const mmPerPx = scale.distanceMm / scalePx
  const stationsMm = stations.map(station => lengthPx(station.p, station.q) * mmPerPx)
  if (!stationsMm.every(Number.isFinite)) throw new RangeError('Station points must be numbers')
  const widthMm = stationsMm.reduce((sum, width) => sum + width, 0) / stations.length
  const clickMm = Math.SQRT2 * CLICK_SIGMA_PX * mmPerPx / Math.sqrt(stations.length)
  const scaleMm = widthMm * Math.SQRT2 * CLICK_SIGMA_PX / scalePx
  const sigmaMm = Math.hypot(Math.max(clickMm, spreadMm(stationsMm)), scaleMm, widthMm * TILT_SHARE)
  return { kind: 'measured', widthMm, sigmaMm: Math.max(LEAST_SIGMA_MM, sigmaMm), stationsMm }
}

/** Standard error of the mean of the stations. */
function spreadMm(stationsMm: readonly number[]): number {
  const count = stationsMm.length
  const mean = stationsMm.reduce((sum, width) => sum + width, 0) / count
  return Math.sqrt(stationsMm.reduce((sum, width) => sum + (width - mean) ** 2, 0) / (count - 1) / count)
}
