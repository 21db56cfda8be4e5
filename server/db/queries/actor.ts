import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { Role } from '../../../shared/types/people'
import { dayIn } from '../../utils/clock'

/** Who asks, in which organisation, with which role; unitIds are the units that are theirs (tenant, engineer, trades). */
export interface Actor {
  userId: string
  name: string
  email: string
  organisationId: string
  role: Role
  unitIds: string[]
  timeZone: string
}

export interface SessionIdentity { userId: string, epoch: number, organisationId?: string }

interface ActorGiven { userId: string, epoch: number, organisationId: string | undefined, preferredId: string | null }

/** Asked at every request. */
const actorRow = compiledOnce((db, given: ActorGiven, shape: { isOrganisationKnown: boolean }) => db.selectFrom('appUser as u')
  .innerJoin('membership as m', 'm.userId', 'u.id')
  .innerJoin('organisation as o', 'o.id', 'm.organisationId')
  .select(['u.id as userId', 'u.name', 'u.email', 'm.organisationId', 'm.role', 'o.timeZone'])
  .where('u.id', '=', given.userId).where('u.sessionEpoch', '=', given.epoch).where('m.endedAt', 'is', null)
  .$if(shape.isOrganisationKnown, query => query.where('m.organisationId', '=', given.organisationId!))
  .orderBy(sql`m.organisation_id is not distinct from ${given.preferredId}::uuid`, 'desc')
  .orderBy('m.createdAt').limit(1))

/**
 * The asker as a member of an organisation; undefined when the session has ended elsewhere or they are no member.
 * Without an organisation the one of the session is preferred, then the oldest membership.
 */
export async function findActor(db: Db, identity: SessionIdentity, organisationId?: string): Promise<Actor | undefined> {
  const given = { userId: identity.userId, epoch: identity.epoch, organisationId, preferredId: identity.organisationId ?? null }
  const row = await actorRow.first(db, given, { isOrganisationKnown: organisationId !== undefined })
  if (!row) return undefined
  const whole = row.role === 'owner' || row.role === 'manager'
  return { ...row, unitIds: whole ? [] : await findUnitIds(db, row.organisationId, row.userId, row.role, dayIn(row.timeZone)) }
}

/** Has this session not been ended by a change of password? Says nothing about memberships. */
export async function isSessionLive(db: Db, identity: SessionIdentity): Promise<boolean> {
  const row = await db.selectFrom('appUser').select('id')
    .where('id', '=', identity.userId).where('sessionEpoch', '=', identity.epoch).executeTakeFirst()
  return row !== undefined
}

async function findUnitIds(db: Db, organisationId: string, userId: string, role: Role, today: string): Promise<string[]> {
  if (role === 'trades') return []
  const rows = role === 'tenant'
    ? await db.selectFrom('tenancyPerson as p').innerJoin('tenancy as t', 't.id', 'p.tenancyId')
        .select('t.unitId').distinct()
        .where('p.userId', '=', userId).where('p.organisationId', '=', organisationId)
        .where('t.startsOn', '<=', sql<string>`${today}::date + 14`)
        .where(eb => eb.or([eb('t.endsOn', 'is', null), eb('t.endsOn', '>=', today)])).execute()
    : await db.selectFrom('unitAccess').select('unitId')
        .where('userId', '=', userId).where('organisationId', '=', organisationId)
        .where(eb => eb.or([eb('untilOn', 'is', null), eb('untilOn', '>=', today)])).execute()
  return rows.map(row => row.unitId)
}

/** For lists: 'all' for people who see the whole portfolio, otherwise their units. */
export const visibleUnits = (actor: Actor): 'all' | string[] =>
  actor.role === 'owner' || actor.role === 'manager' ? 'all' : actor.unitIds
