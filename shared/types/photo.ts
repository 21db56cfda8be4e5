export const PHOTO_SIZES = ['thumb', 'screen', 'full'] as const
export type PhotoSize = typeof PHOTO_SIZES[number]

export const PHOTO_VIEWS = ['wide', 'close', 'before', 'after', 'item'] as const
export type PhotoView = typeof PHOTO_VIEWS[number]

export const MAX_PHOTO_BYTES = 20 * 1000 * 1000
export const MAX_PHOTOS_PER_REPORT = 6

/** A stored photo as screens know it; its picture is at photoPath(id, size). */
export interface PhotoRef {
  id: string
  view: PhotoView
  widthPx: number
  heightPx: number
  /** What the camera's own clock said, 'YYYY-MM-DD HH:MM:SS' and its offset when known. A claim, not a proof. */
  cameraTime: string | null
  uploadedAt: string
}

export const photoPath = (id: string, size: PhotoSize) => `/photos/${id}/${size}`
