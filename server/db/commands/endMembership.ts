import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import { nowInstant } from '../../utils/clock'
import { notFound, problem } from '../../utils/problems'
import { appendRecord } from './appendRecord'
import { refuseOwnersBusiness } from './invitePerson'

/**
 * Ends somebody's access at once. Their links to homes go too, so that coming back later opens only what
 * the new invitation says; the record keeps which they were.
 */
export function endMembership(db: Db, actor: Actor, membership: Thing<'membership'>): Promise<{ ended: true }> {
  refuseOwnersBusiness(actor, membership.role)
  const { id, organisationId, userId, role } = membership
  return db.transaction().execute(async (trx) => {
    if (role === 'owner') await refuseLastOwner(trx, membership)
    const ended = await trx.updateTable('membership').set({ endedAt: nowInstant() })
      .where('id', '=', id).where('endedAt', 'is', null).returning('id').executeTakeFirst()
    if (!ended) throw notFound()
    const tenancies = await trx.deleteFrom('tenancyPerson').where('userId', '=', userId).where('organisationId', '=', organisationId).returning('tenancyId').execute()
    const access = await trx.deleteFrom('unitAccess').where('userId', '=', userId).where('organisationId', '=', organisationId).returning('unitId').execute()
    const { name } = await trx.selectFrom('appUser').select('name').where('id', '=', userId).executeTakeFirstOrThrow()
    await appendRecord(trx, actor, {
      organisationId, unitId: null, action: 'access ended', subjectKind: 'person', subjectId: userId,
      before: { name, role, tenancyIds: tenancies.map(row => row.tenancyId), unitIds: access.map(row => row.unitId) }, after: { name, role: null },
    })
    return { ended: true }
  })
}

/** The organisation's row is locked first: two owners ending each other at the same moment must not both succeed. */
async function refuseLastOwner(trx: Trx, { id, organisationId }: Thing<'membership'>) {
  await trx.selectFrom('organisation').select('id').where('id', '=', organisationId).forUpdate().execute()
  const other = await trx.selectFrom('membership').select('id').where('organisationId', '=', organisationId)
    .where('role', '=', 'owner').where('endedAt', 'is', null).where('id', '!=', id).limit(1).executeTakeFirst()
  if (!other) throw problem(409, 'last-owner', 'An organisation needs an owner. Invite another one first.')
}
