import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import { readMe } from '../queries/accounts'
import { clash, notSignedIn } from '../../utils/problems'
import type { AccountEdit } from '../../../shared/schemas/account'
import type { Me } from '../../../shared/types/people'
import { appendRecord } from './appendRecord'

/** A person's own details; the digest belongs to the organisation they are looking at. A clash shows no more than these fields. */
export function editAccount(db: Db, actor: Actor, { version, digest, ...details }: AccountEdit): Promise<Me> {
  return db.transaction().execute(async (trx) => {
    const before = await trx.selectFrom('appUser').select(['name', 'phone', 'unitsOfMeasure', 'version'])
      .where('id', '=', actor.userId).forUpdate().executeTakeFirst()
    if (!before) throw notSignedIn()
    const membership = trx.updateTable('membership').where('userId', '=', actor.userId).where('organisationId', '=', actor.organisationId)
    if (before.version !== version) {
      const { digest: digestNow } = await trx.selectFrom('membership').select('digest')
        .where('userId', '=', actor.userId).where('organisationId', '=', actor.organisationId).executeTakeFirstOrThrow()
      throw clash({ ...before, digest: digestNow })
    }
    await membership.set({ digest }).execute()
    await trx.updateTable('appUser').set(eb => ({ ...details, version: eb('version', '+', 1) })).where('id', '=', actor.userId).execute()
    if (before.name !== details.name || before.phone !== details.phone) {
      await appendRecord(trx, actor, {
        organisationId: actor.organisationId, unitId: null, action: 'own details changed', subjectKind: 'person', subjectId: actor.userId,
        before: { name: before.name, phone: before.phone }, after: { name: details.name, phone: details.phone },
      })
    }
    return readMe(trx, actor)
  })
}
