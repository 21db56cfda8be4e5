import type { Db } from '../connect'
import type { PhotoRef, PhotoView } from '../../../shared/types/photo'
import { PHOTO_SIZES } from '../../../shared/types/photo'
import { now, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { PHOTO_MEDIA_TYPES, photoKey, preparePhoto } from '../../utils/photoImage'
import type { PhotoStore } from '../../utils/photoStore'
import { tooMany } from '../../utils/problems'
import { countLoosePhotos, findLooseTwin, photoRefColumns } from '../queries/photos'

/** Ours: four full reports' worth that were sent but belong to nothing yet. */
const MOST_LOOSE_PHOTOS = 24
const HOUR_MS = 3_600_000

interface PhotoHome { id: string, organisationId: string }

/**
 * Keeps one uploaded picture for a unit; it belongs to nothing until a report, reading or job names it.
 * The same file sent twice by the same person (a retry on a bad line) answers the first.
 */
export async function storePhoto(db: Db, store: PhotoStore, actor: { userId: string }, unit: PhotoHome, upload: { bytes: Buffer, view: PhotoView }): Promise<PhotoRef> {
  const since = new Date(now().getTime() - 24 * HOUR_MS).toISOString()
  if (await countLoosePhotos(db, actor.userId, since) >= MOST_LOOSE_PHOTOS) throw tooMany(3600)
  const photo = await preparePhoto(upload.bytes)
  const twin = await findLooseTwin(db, { uploadedBy: actor.userId, unitId: unit.id, sha256: photo.sha256, view: upload.view })
  if (twin) return twin
  const id = newId()
  const storedKey = `${unit.organisationId}/${id}`
  const removeAll = () => Promise.allSettled(PHOTO_SIZES.map(size => store.delete(photoKey(storedKey, size))))
  try {
    for (const size of PHOTO_SIZES) await store.put(photoKey(storedKey, size), photo.sizes[size], PHOTO_MEDIA_TYPES[size])
    return await db.insertInto('photo').values({
      id, organisationId: unit.organisationId, unitId: unit.id, view: upload.view, sha256: photo.sha256,
      widthPx: photo.widthPx, heightPx: photo.heightPx, byteLength: photo.byteLength, storedKey,
      cameraTime: photo.cameraTime ?? null, uploadedBy: actor.userId, uploadedAt: nowInstant(),
    }).returning(photoRefColumns).executeTakeFirstOrThrow()
  }
  catch (error) {
    await removeAll()
    throw error
  }
}
