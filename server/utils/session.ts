import type { H3Event } from 'h3'
import type { Db } from '../db/connect'
import { findSessionUser } from '../db/queries/accounts'
import { findActor, type Actor, type SessionIdentity } from '../db/queries/actor'
import { notFound } from './problems'

declare module '#auth-utils' {
  interface User { id: string, epoch: number }
  interface UserSession { organisationId?: string }
}

/** Who the sealed cookie says this is. The epoch is held against the database by findActor. */
export async function sessionIdentity(event: H3Event): Promise<SessionIdentity | undefined> {
  // Reading a session that is not there would make one and set a cookie.
  if (!getCookie(event, useRuntimeConfig(event).session.name ?? 'nuxt-session')) return undefined
  const { user, organisationId } = await getUserSession(event)
  return user ? { userId: user.id, epoch: user.epoch, organisationId } : undefined
}

/** The account of a live session, whatever its memberships; for the public routes. */
export async function sessionUser(event: H3Event, db: Db) {
  const identity = await sessionIdentity(event)
  return identity && findSessionUser(db, identity)
}

/** The same session, now looking at another organisation of theirs; 404 when it is not. */
export async function moveSession(event: H3Event, db: Db, organisationId: string): Promise<Actor> {
  const identity = await sessionIdentity(event)
  const there = identity && await findActor(db, identity, organisationId)
  if (!there) throw notFound()
  await openSession(event, { id: identity.userId, sessionEpoch: identity.epoch }, there.organisationId)
  return there
}

export async function openSession(event: H3Event, user: { id: string, sessionEpoch: number }, organisationId?: string) {
  await replaceUserSession(event, { user: { id: user.id, epoch: user.sessionEpoch }, organisationId })
}
