import type { Trx } from '../connect'
import { lockLoosePhotos } from '../queries/photos'
import { unsound } from '../../utils/problems'

interface PhotoOwner { observationId?: string, readingId?: string, markId?: string, jobId?: string, itemId?: string }

/** Ties this person's own loose photos of the unit to what they show. One that is missing or taken refuses the whole. */
export async function attachPhotos(trx: Trx, actor: { userId: string }, unitId: string, ids: string[], owner: PhotoOwner) {
  if (ids.length === 0) return []
  const photos = await lockLoosePhotos(trx, actor.userId, unitId, ids)
  if (photos.length !== new Set(ids).size) throw unsound({ photoIds: 'One of the photos is no longer there. Please add it again.' })
  await trx.updateTable('photo').set(owner).where('id', 'in', ids).execute()
  return photos
}
