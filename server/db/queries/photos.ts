import { compiledOnce } from '../compiledOnce'
import type { Db, Trx } from '../connect'
import type { PhotoRef } from '../../../shared/types/photo'

export const photoRefColumns = ['id', 'view', 'widthPx', 'heightPx', 'cameraTime', 'uploadedAt'] as const

/** Loose: sent, but not yet part of a report, reading, item or job. */
const loosePhotos = (db: Db | Trx, uploadedBy: string) => db.selectFrom('photo')
  .where('uploadedBy', '=', uploadedBy)
  .where('observationId', 'is', null).where('readingId', 'is', null).where('markId', 'is', null)
  .where('itemId', 'is', null).where('jobId', 'is', null)

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
