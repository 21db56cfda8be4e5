import { createHash } from 'node:crypto'
import type { Db } from '../connect'
import type { AtticDocumentValue } from '../../../shared/schemas/attic'
import type { PhotoStore } from '../../utils/photoStore'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { problem } from '../../utils/problems'
import { appendRecord, type RecordActor } from './appendRecord'
import { judgeAttic } from './judgeAttic'
import { lockAttic, type AtticRef } from './lockAttic'
import { lockUnit } from './lockUnit'
import { refuseFuture } from './refuseFuture'

interface UploadedFile { fileName: string, mediaType: string, bytes: Buffer }

/** Keeps a paper with its file and judges the attic by it. The file is stored first, so that no row points at nothing. */
export async function keepDocument(db: Db, store: PhotoStore, actor: RecordActor & { userId: string, timeZone: string }, attic: AtticRef, input: AtticDocumentValue, file: UploadedFile) {
  refuseFuture('writtenOn', input.writtenOn, actor)
  const id = newId()
  const storedKey = `documents/${attic.organisationId}/${id}`
  const sha256 = createHash('sha256').update(file.bytes).digest('hex')
  await store.put(storedKey, file.bytes, file.mediaType)
  const kept = db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    const row = await trx.insertInto('atticDocument').values({
      id, organisationId: attic.organisationId, unitId: attic.unitId, atticId: attic.id, ...input,
      fileName: file.fileName, mediaType: file.mediaType, byteLength: file.bytes.length, sha256, storedKey,
      addedBy: actor.userId, createdAt: nowInstant(), withdrawnAt: null,
    }).returning(['id', 'fileName', 'mediaType', 'byteLength', 'sha256']).executeTakeFirstOrThrow()
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', subjectId: attic.id, action: 'document added', after: { documentId: id, ...input, fileName: row.fileName, sha256 },
    })
    await judgeAttic(trx, actor, attic.id)
    return row
  })
  return kept.catch(async (error: unknown) => {
    await store.delete(storedKey)
    throw error
  })
}

/** A paper that no longer holds: kept, but it rates nothing any more. */
export function withdrawDocument(db: Db, actor: RecordActor, document: { id: string, organisationId: string, unitId: string, atticId: string }) {
  return db.transaction().execute(async (trx) => {
    await lockUnit(trx, document.organisationId, document.unitId)
    const withdrawnAt = nowInstant()
    const { numUpdatedRows } = await trx.updateTable('atticDocument').set({ withdrawnAt }).where('id', '=', document.id).where('withdrawnAt', 'is', null).executeTakeFirst()
    if (Number(numUpdatedRows) === 0) throw problem(409, 'withdrawn', 'This paper was withdrawn before.')
    await appendRecord(trx, actor, {
      organisationId: document.organisationId, unitId: document.unitId, subjectKind: 'attic', subjectId: document.atticId, action: 'document withdrawn', after: { documentId: document.id, withdrawnAt },
    })
    await judgeAttic(trx, actor, document.atticId)
    return { withdrawnAt }
  })
}
