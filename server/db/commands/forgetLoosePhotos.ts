import type { Db } from '../connect'
import { now } from '../../utils/clock'
import { PHOTO_SIZES } from '../../../shared/types/photo'
import { photoKey } from '../../utils/photoImage'
import type { PhotoStore } from '../../utils/photoStore'
import { lockLoosePhotosBefore } from '../queries/photos'

const DAY_MS = 86_400_000
/** Ours: a report begun and left is kept on the phone that long; its photos may still be named by it. */
export const LOOSE_PHOTO_DAYS = 30
const BATCH = 100

/**
 * Removes pictures that were sent for a report or reading which never came. Files go before rows: cut off in between,
 * the next run finds the row again. Answers how many were removed.
 */
export async function forgetLoosePhotos(db: Db, store: PhotoStore): Promise<number> {
  const before = new Date(now().getTime() - LOOSE_PHOTO_DAYS * DAY_MS).toISOString()
  for (let removed = 0; ;) {
    const batch = await db.transaction().execute(async (trx) => {
      const photos = await lockLoosePhotosBefore(trx, before, BATCH)
      for (const { storedKey } of photos) await Promise.all(PHOTO_SIZES.map(size => store.delete(photoKey(storedKey, size))))
      if (photos.length > 0) await trx.deleteFrom('photo').where('id', 'in', photos.map(photo => photo.id)).execute()
      return photos.length
    })
    removed += batch
    if (batch < BATCH) return removed
  }
}
