import type { PhotoMeasure, PixelPoint } from '~/shared/types/readingDetail'

/** Which part of a picture a frame shows: picture point (xPx, yPx) stands at the frame's upper left corner, `zoom` screen pixels a picture pixel. */
export interface PhotoView { zoom: number, xPx: number, yPx: number }
export interface Size { width: number, height: number }

/** Ours: closer than this a picture shows its squares and nothing more. */
const MOST_ZOOM = 12
/** A frame or a picture without any size must not divide by nothing. */
const LEAST_ZOOM = 1e-4

export const wholePhoto = (picture: Size, frame: Size): PhotoView => insideOf({ zoom: fitZoom(picture, frame), xPx: 0, yPx: 0 }, picture, frame)

const fitZoom = (picture: Size, frame: Size) => Math.min(frame.width / picture.width, frame.height / picture.height)

/** Never out of sight: the picture fills the frame, or stands in its middle where it is smaller. */
export function insideOf({ zoom, xPx, yPx }: PhotoView, picture: Size, frame: Size): PhotoView {
  const held = Math.max(LEAST_ZOOM, Math.min(MOST_ZOOM, Math.max(fitZoom(picture, frame), zoom)))
  const along = (at: number, whole: number, seen: number) => seen >= whole ? (whole - seen) / 2 : Math.min(whole - seen, Math.max(0, at))
  return { zoom: held, xPx: along(xPx, picture.width, frame.width / held), yPx: along(yPx, picture.height, frame.height / held) }
}

/** Closer or farther, with the picture point under `at` (in the frame) staying where it is. */
export function zoomAbout(view: PhotoView, times: number, at: { x: number, y: number }, picture: Size, frame: Size): PhotoView {
  const point = toPicture(view, at)
  const { zoom } = insideOf({ ...view, zoom: view.zoom * times }, picture, frame)
  return insideOf({ zoom, xPx: point.xPx - at.x / zoom, yPx: point.yPx - at.y / zoom }, picture, frame)
}

export const toPicture = ({ zoom, xPx, yPx }: PhotoView, at: { x: number, y: number }): PixelPoint => ({ xPx: xPx + at.x / zoom, yPx: yPx + at.y / zoom })

export const toFrame = ({ zoom, xPx, yPx }: PhotoView, point: PixelPoint) => ({ x: (point.xPx - xPx) * zoom, y: (point.yPx - yPx) * zoom })

export const clampPoint = ({ xPx, yPx }: PixelPoint, { width, height }: Size): PixelPoint =>
  ({ xPx: Math.min(width, Math.max(0, xPx)), yPx: Math.min(height, Math.max(0, yPx)) })

/** Points as they were tapped: two of the scale, then two at each place. */
export function measureOf(points: readonly PixelPoint[], distanceMm: number | null, photo: { photoId: string, widthPx: number, heightPx: number }): PhotoMeasure | null {
  const [a, b, ...across] = points
  if (!a || !b || distanceMm === null || !(distanceMm > 0)) return null
  const stations = Array.from({ length: Math.floor(across.length / 2) }, (_, i) => ({ p: across[2 * i]!, q: across[2 * i + 1]! }))
  return { ...photo, a, b, distanceMm, stations }
}

/** 'Scale, first end', 'Place 2, second edge'. */
export function pointName(index: number): string {
  if (index < 2) return `Scale, ${index === 0 ? 'first' : 'second'} end`
  return `Place ${Math.floor(index / 2)}, ${index % 2 === 0 ? 'one' : 'other'} edge`
}

const ARROWS: Record<string, [number, number]> = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] }

/** Where an arrow key moves a point: by one picture pixel, with Shift by ten. Null for other keys. */
export function nudge({ xPx, yPx }: PixelPoint, key: string, far: boolean): PixelPoint | null {
  const step = ARROWS[key]
  const by = far ? 10 : 1
  return step ? { xPx: xPx + step[0] * by, yPx: yPx + step[1] * by } : null
}

/** Sizes of what lies beside a crack anyway. Cards: ISO/IEC 7810 ID-1. Coins: US Mint, diameter. */
export const SCALES = [
  { value: 85.6, label: 'a bank card, the long side: 85.60 mm' },
  { value: 53.98, label: 'a bank card, the short side: 53.98 mm' },
  { value: 24.26, label: 'a quarter, across: 24.26 mm' },
  { value: 21.21, label: 'a nickel, across: 21.21 mm' },
  { value: 19.05, label: 'a cent, across: 19.05 mm' },
  { value: 17.91, label: 'a dime, across: 17.91 mm' },
] as const
