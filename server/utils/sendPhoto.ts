import type { H3Event } from 'h3'
import { getHeader, getRouterParam, setResponseHeaders, setResponseStatus } from 'h3'
import { PHOTO_SIZES, type PhotoSize } from '../../shared/types/photo'
import { PHOTO_MEDIA_TYPES, photoKey } from './photoImage'
import type { PhotoStore } from './photoStore'
import { notFound, problem } from './problems'

/** Picture bytes never change under their id, so the browser may ask only whether it still may see them. */
export async function sendPhoto(event: H3Event, store: PhotoStore, photo: { id: string, storedKey: string }): Promise<Buffer | null> {
  const size = getRouterParam(event, 'size')
  if (!isSize(size)) throw notFound()
  const etag = `"${photo.id}-${size}"`
  setResponseHeaders(event, {
    'cache-control': 'private, no-cache',
    'etag': etag,
    'x-content-type-options': 'nosniff',
    'content-security-policy': 'default-src \'none\'; sandbox',
    'content-disposition': 'inline',
  })
  if (getHeader(event, 'if-none-match') === etag) {
    setResponseStatus(event, 304)
    return null
  }
  const bytes = await store.get(photoKey(photo.storedKey, size))
  if (!bytes) throw problem(404, 'photo-missing', 'The picture itself is not in the photo store. Its entry in the record is.')
  setResponseHeaders(event, { 'content-type': PHOTO_MEDIA_TYPES[size], 'content-length': bytes.length })
  return bytes
}

const isSize = (value: unknown): value is PhotoSize => (PHOTO_SIZES as readonly unknown[]).includes(value)
