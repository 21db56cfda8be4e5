import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { Actor, SessionIdentity } from './actor'
import { abilitiesOf } from '../../utils/policy'
import type { Me } from '../../../shared/types/people'

/** The person with this address, for checking a password. */
export function findUserByEmail(db: Db, email: string) {
  return db.selectFrom('appUser').select(['id', 'name', 'email', 'passwordHash', 'sessionEpoch']).where('email', '=', email).executeTakeFirst()
}

export function findSessionUser(db: Db, identity: SessionIdentity) {
  return db.selectFrom('appUser').select(['id', 'name', 'email', 'sessionEpoch'])
    .where('id', '=', identity.userId).where('sessionEpoch', '=', identity.epoch).executeTakeFirst()
}

const membershipsOf = compiledOnce((db, given: { userId: string }) => db.selectFrom('membership as m')
  .innerJoin('appUser as u', 'u.id', 'm.userId').innerJoin('organisation as o', 'o.id', 'm.organisationId')
  .select(['u.id', 'u.name', 'u.email', 'u.phone', 'u.unitsOfMeasure', 'u.version', 'm.role', 'm.digest', 'o.id as organisationId',
    'o.name as organisationName', 'o.timeZone', 'o.currency', 'o.contactPhone', 'o.isDemo'])
  .where('m.userId', '=', given.userId).where('m.endedAt', 'is', null)
  .orderBy(sql`lower(o.name)`).orderBy('o.id'))

/** What the asker's own screens may know: one statement, one row a membership. */
export async function readMe(db: Db, actor: Actor): Promise<Me> {
  const rows = await membershipsOf.rows(db, { userId: actor.userId })
  const here = rows.find(row => row.organisationId === actor.organisationId)!
  const { id, name, email, phone, unitsOfMeasure, version } = here
  return {
    user: { id, name, email, phone, unitsOfMeasure, version },
    organisation: {
      id: here.organisationId, name: here.organisationName, role: here.role, timeZone: here.timeZone,
      currency: here.currency, contactPhone: here.contactPhone, isDemo: here.isDemo,
    },
    organisations: rows.map(row => ({ id: row.organisationId, name: row.organisationName, role: row.role })),
    abilities: abilitiesOf(actor.role),
    unitIds: actor.role === 'owner' || actor.role === 'manager' ? null : actor.unitIds,
    digest: here.digest,
  }
}
