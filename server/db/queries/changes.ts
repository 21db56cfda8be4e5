import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { SessionIdentity } from './actor'

interface Given { userId: string, epoch: number }

/** app_user's own changes are counted in each of the person's organisations. */
const changesSeen = compiledOnce((db, { userId, epoch }: Given) => db.selectFrom('appUser as u')
  .leftJoin('membership as m', join => join.onRef('m.userId', '=', 'u.id').on('m.endedAt', 'is', null))
  .leftJoin('organisationChange as c', 'c.organisationId', 'm.organisationId')
  .where('u.id', '=', userId).where('u.sessionEpoch', '=', epoch)
  .groupBy('u.id')
  .select([sql<number>`count(distinct m.id)`.as('memberships'), sql<number>`coalesce(sum(c.changes), 0)::bigint`.as('changes')]))

/**
 * Stands for the state of everything this person could see: as long as it stays the same, no row of any of their
 * organisations has changed. Undefined when the session has ended.
 */
export async function findStateSeen(db: Db, { userId, epoch }: SessionIdentity): Promise<string | undefined> {
  const row = await changesSeen.first(db, { userId, epoch })
  return row && `${row.memberships}.${row.changes}`
}
