import type { TipState, WidthComparison } from './mark'

/** A point in a photo, in pixels, after the camera's orientation has been applied. */
export interface PixelPoint { xPx: number, yPx: number }

/** What a person tapped in a photo: two points a known distance apart, then pairs across the mark. */
export interface PhotoMeasure {
  photoId: string
  /** Of the picture the points were tapped in. */
  widthPx: number
  heightPx: number
  a: PixelPoint
  b: PixelPoint
  distanceMm: number
  stations: { p: PixelPoint, q: PixelPoint }[]
}

/** Pins or a tell-tale fixed across a crack: they show the change since they were set. */
export interface SinceSet { nowMm: number, setMm: number, widthWhenSetMm: number }

/** What a reading may carry besides its size; kept in reading.detail. */
export interface ReadingDetail {
  observationId?: string
  spanMm?: number | null
  tip?: TipState | null
  /** How far both tips together are past their dated pencil marks. */
  tipPastMm?: number | null
  comparison?: WidthComparison | null
  /** The report made of danger signs seen with this reading. */
  reportId?: string
  photo?: PhotoMeasure | null
  /** As measured along it, mm. */
  stationsMm?: number[] | null
  sinceSet?: SinceSet | null
  checkRulerMm?: number | null
  /** A number that was written first and then asked about; `value` is what the person stood by. */
  wroteFirst?: number | null
  /** The usual size that made us ask. */
  askedAgainstUsual?: number | null
  /** What the phone's clock said, where it was off from the server's. */
  phoneAt?: string | null
  /** The day the camera wrote into a photo, where it is not the day given. */
  cameraOn?: string | null
}
