import { compiledOnce } from '../compiledOnce'
import type { Db, Trx } from '../connect'
import type { PhotoRef } from '../../../shared/types/photo'

export const photoRefColumns = ['id', 'view', 'widthPx', 'heightPx', 'cameraTime', 'uploadedAt'] as const

/** What a photo can be part of. */
export const PHOTO_OWNERS = ['observationId', 'readingId', 'markId', 'itemId', 'jobId'] as const

/** Loose: sent, but not yet part of anything. */
const allLoosePhotos = (db: Db | Trx) => db.selectFrom('photo').where(eb => eb.and(PHOTO_OWNERS.map(owner => eb(owner, 'is', null))))

const loosePhotos = (db: Db | Trx, uploadedBy: string) => allLoosePhotos(db).where('uploadedBy', '=', uploadedBy)

/** Those nobody named in time, and that nobody is naming just now. */
export const lockLoosePhotosBefore = (trx: Trx, uploadedBefore: string, limit: number) =>
  allLoosePhotos(trx).select(['id', 'storedKey']).where('uploadedAt', '<', uploadedBefore).orderBy('id').limit(limit).forUpdate().skipLocked().execute()

export async function countLoosePhotos(db: Db, uploadedBy: string, since: string): Promise<number> {
  const row = await loosePhotos(db, uploadedBy).where('uploadedAt', '>=', since)
    .select(eb => eb.fn.countAll<number>().as('count')).executeTakeFirstOrThrow()
  return row.count
}

export const findLooseTwin = (db: Db, twin: { uploadedBy: string, unitId: string, sha256: string, view: PhotoRef['view'] }): Promise<PhotoRef | undefined> =>
  loosePhotos(db, twin.uploadedBy).select(photoRefColumns)
    .where('unitId', '=', twin.unitId).where('sha256', '=', twin.sha256).where('view', '=', twin.view)
    .orderBy('uploadedAt').limit(1).executeTakeFirst()

/** This person's own loose photos of this unit among the ids, locked until the end of the transaction. */
export const lockLoosePhotos = (trx: Trx, uploadedBy: string, unitId: string, ids: string[]) =>
  loosePhotos(trx, uploadedBy).select([...photoRefColumns, 'sha256'])
    .where('unitId', '=', unitId).where('id', 'in', ids).forUpdate().execute()

const photosOfMark = compiledOnce((db, { markId }: { markId: string }) =>
  db.selectFrom('photo as p').innerJoin('appUser as u', 'u.id', 'p.uploadedBy')
    .select(['p.id', 'p.view', 'p.widthPx', 'p.heightPx', 'p.cameraTime', 'p.uploadedAt', 'p.readingId', 'p.observationId', 'u.name as uploadedBy'])
    .where('p.markId', '=', markId).orderBy('p.uploadedAt', 'desc').limit(200))

export const listPhotosOfMark = (db: Db, markId: string): Promise<(PhotoRef & { readingId: string | null, observationId: string | null, uploadedBy: string })[]> =>
  photosOfMark.rows(db, { markId })
