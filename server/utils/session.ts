import type { H3Event } from 'h3'
import type { Db } from '../db/connect'
import { findSessionUser } from '../db/queries/accounts'
import { findActor, type Actor, type SessionIdentity } from '../db/queries/actor'
import { notFound } from './problems'

declare module '#auth-utils' {
  interface User { id: string, epoch: number }
  interface UserSession { organisationId?: string }
}

const MOST_KEPT = 5_000
const KEPT_MS = 60_000

/**
 * Unsealing takes several times as long as a whole quick route, and a page asks several routes with one cookie. The same
 * sealed text always holds the same identity, so it is kept for a minute; whether it still counts is asked of the database each time.
 */
const unsealed = new Map<string, { identity: SessionIdentity, until: number }>()

function keepUnsealed(sealed: string, identity: SessionIdentity) {
  // A map remembers the order of its keys: the first is the one kept longest.
  if (unsealed.size >= MOST_KEPT) unsealed.delete(unsealed.keys().next().value!)
  unsealed.set(sealed, { identity, until: Date.now() + KEPT_MS })
}

/** Who the sealed cookie says this is. The epoch is held against the database by findActor. */
export async function sessionIdentity(event: H3Event): Promise<SessionIdentity | undefined> {
  // Reading a session that is not there would make one and set a cookie. The configuration of the process, not a copy for this event.
  const sealed = getCookie(event, useRuntimeConfig().session.name ?? 'nuxt-session')
  if (!sealed) return undefined
  const kept = unsealed.get(sealed)
  if (kept && kept.until > Date.now()) return kept.identity
  unsealed.delete(sealed)
  const { user, organisationId } = await getUserSession(event)
  if (!user) return undefined
  const identity = { userId: user.id, epoch: user.epoch, organisationId }
  keepUnsealed(sealed, identity)
  return identity
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
