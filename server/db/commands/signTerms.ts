import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import { readTerms } from '../queries/storageTerms'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { clash, problem } from '../../utils/problems'
import { appendRecord } from './appendRecord'
import { lockAttic, type AtticRef } from './lockAttic'

/** A tenant's name and the server's time under the terms as they stand; what changed since they were read is refused. */
export function signTerms(db: Db, actor: Actor, attic: AtticRef & { name: string }, { signedName, rules }: { signedName: string, rules: string[] }) {
  return db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    const { terms, signatures } = await readTerms(trx, actor, attic)
    if (rules.join('\n') !== terms.rules.join('\n')) throw clash(terms, 'The terms changed while you were reading. Please read them again.')
    if (signatures.some(signature => signature.isCurrent && signature.isMine)) throw problem(409, 'signed-already', 'You have signed these terms already.')
    const signedAt = nowInstant()
    const id = newId()
    await trx.insertInto('termsSignature').values({
      id, organisationId: attic.organisationId, unitId: attic.unitId, atticId: attic.id, userId: actor.userId, signedName, terms: JSON.stringify(terms), signedAt,
    }).execute()
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', subjectId: attic.id, action: 'terms of storage signed', after: { signedName, terms },
    })
    return { id, signedAt }
  })
}
