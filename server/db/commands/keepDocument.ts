import { createHash } from 'node:crypto'
import type { Db } from '../connect'
import type { AtticDocumentValue } from '../../../shared/schemas/attic'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord, type RecordActor } from './appendRecord'
import { judgeAttic } from './judgeAttic'

interface AtticRef { id: string, organisationId: string, unitId: string }
interface StoredFile { fileName: string, mediaType: string, bytes: Buffer, store: (key: string, bytes: Buffer, mediaType: string) => Promise<void> }

/** Keeps a paper with its file and judges the attic by it. The file is stored first, so that no row points at nothing. */
export async function keepDocument(db: Db, actor: RecordActor & { userId: string }, attic: AtticRef, input: AtticDocumentValue, file: StoredFile) {
  const id = newId()
  const storedKey = `documents/${attic.organisationId}/${id}`
  const sha256 = createHash('sha256').update(file.bytes).digest('hex')
  await file.store(storedKey, file.bytes, file.mediaType)
  return db.transaction().execute(async (trx) => {
    const row = await trx.insertInto('atticDocument').values({
      id, organisationId: attic.organisationId, unitId: attic.unitId, atticId: attic.id, ...input,
      fileName: file.fileName.slice(0, 200), mediaType: file.mediaType, byteLength: file.bytes.length, sha256, storedKey,
      addedBy: actor.userId, createdAt: nowInstant(), withdrawnAt: null,
    }).returningAll().executeTakeFirstOrThrow()
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', subjectId: attic.id, action: 'document added', after: { documentId: id, ...input, fileName: row.fileName, sha256 },
    })
    await judgeAttic(trx, actor, attic.id)
    return row
  })
}

/** A paper that no longer holds: kept, but it rates nothing any more. */
export function withdrawDocument(db: Db, actor: RecordActor, document: { id: string, organisationId: string, unitId: string, atticId: string }) {
  return db.transaction().execute(async (trx) => {
    const withdrawnAt = nowInstant()
    await trx.updateTable('atticDocument').set({ withdrawnAt }).where('id', '=', document.id).where('withdrawnAt', 'is', null).execute()
    await appendRecord(trx, actor, {
      organisationId: document.organisationId, unitId: document.unitId, subjectKind: 'attic', subjectId: document.atticId, action: 'document withdrawn', after: { documentId: document.id, withdrawnAt },
    })
    await judgeAttic(trx, actor, document.atticId)
    return { withdrawnAt }
  })
}
