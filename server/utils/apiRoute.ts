import type { EventHandler, H3Event } from 'h3'
import type { z } from 'zod'
import type { Db } from '../db/connect'
import { findActor, isSessionLive, type Actor, type SessionIdentity } from '../db/queries/actor'
import { things, type Thing, type ThingName } from '../db/queries/things'
import { keptAnswer } from './keptAnswers'
import { isId } from './newId'
import { abilitiesOf, reachOf, withinReach, type Ability } from './policy'
import { noMembership, notAllowed, notFound, notSignedIn, problem, problemFromDatabase } from './problems'
import { readInput } from './readInput'
import { sessionIdentity } from './session'
import { useDb } from './useDb'

export interface RouteContext {
  event: H3Event
  db: Db
  actor: Actor
  /** The Idempotency-Key sent along, when it is a sound UUID. */
  clientKey: string | undefined
}

interface RouteOptions<K extends ThingName, B extends z.ZodType, Q extends z.ZodType, A> {
  can: Ability
  on?: { [P in K]: string }
  body?: B
  query?: Q
  /** For reads that depend on nothing but the asker, the address, and rows of their organisations: made again only after a change. */
  kept?: boolean
  handle: (context: RouteContext & { [P in K]: Thing<P> } & { body: z.output<B>, query: z.output<Q> }) => Promise<A> | A
}

/**
 * Every JSON route but the short public list goes through here.
 * Fixed order: signed in → belongs → allowed → input sound → work.
 */
export function apiRoute<K extends ThingName = never, B extends z.ZodType = z.ZodNever, Q extends z.ZodType = z.ZodNever, A = unknown>(options: RouteOptions<K, B, Q, A>): EventHandler {
  async function answer(event: H3Event, db: Db) {
    const { actor, found } = await admit(event, db, options)
    const query = options.query ? await readInput(options.query, getQuery(event)) : undefined
    const body = options.body ? await readInput(options.body, await readJson(event)) : undefined
    const clientKey = getHeader(event, 'idempotency-key')
    return options.handle({ event, db, actor, ...found, body, query, clientKey: isId(clientKey) ? clientKey : undefined } as Parameters<typeof options.handle>[0])
  }
  return guarded((event) => {
    const db = useDb()
    return options.kept ? keptAnswer(event, db, () => answer(event, db)) : answer(event, db)
  })
}

/** For the few routes before sign-in: same errors, no actor. */
export function publicRoute<A>(handle: (context: { event: H3Event, db: Db }) => Promise<A> | A): EventHandler {
  return guarded(event => handle({ event, db: useDb() }))
}

/** Signed in → belongs → allowed, for routes that answer something else than JSON too. */
export async function admit<K extends ThingName>(event: H3Event, db: Db, options: { can: Ability, on?: { [P in K]: string } }): Promise<{ actor: Actor, found: { [P in K]: Thing<P> } }> {
  const identity = await sessionIdentity(event)
  if (!identity) throw notSignedIn()
  const [name, param] = (Object.entries(options.on ?? {})[0] ?? []) as [K, string] | []
  const thing = name && param ? await findThing(db, name, getRouterParam(event, param)) : undefined
  const actor = await findActor(db, identity, thing?.organisationId)
  if (!actor) throw await refusalOf(db, identity, name)
  if (name && !thing) throw notFound()
  if (thing) {
    const reach = withinReach(actor, options.can, thing)
    if (reach === 'not theirs') throw notFound()
    if (reach === 'role too small') throw notAllowed()
  }
  else if (!reachOf(actor.role, options.can)) throw notAllowed()
  return { actor, found: (name ? { [name]: thing } : {}) as { [P in K]: Thing<P> } }
}

/** A session that has ended learns nothing; a live one learns that the thing is not there for it, or that no membership is left. */
async function refusalOf(db: Db, identity: SessionIdentity, about: string | undefined) {
  if (!await isSessionLive(db, identity)) return notSignedIn()
  return about ? notFound() : noMembership()
}

async function findThing<K extends ThingName>(db: Db, name: K, id: string | undefined) {
  return (isId(id) ? await things[name](db, id) : undefined) as Thing<K> & { organisationId: string, unitId: string | null } | undefined
}

/** The body as JSON; 415 and 422 when it is something else. */
export async function readJson(event: H3Event): Promise<unknown> {
  const type = getHeader(event, 'content-type') ?? ''
  if (!type.startsWith('application/json')) throw problem(415, 'not-json', 'This address takes JSON.')
  const text = await readRawBody(event)
  try { return JSON.parse(text ?? '') }
  catch { throw problem(422, 'not-json', 'What arrived could not be read as JSON.') }
}

function guarded<A>(handle: (event: H3Event) => Promise<A> | A): EventHandler {
  return defineEventHandler(async (event) => {
    try { return await handle(event) }
    catch (error) {
      event.context.mayKeepPage = false
      const known = problemFromDatabase(error)
      if (known?.statusCode === 503) setResponseHeader(event, 'Retry-After', 5)
      const retry = (error as { data?: { retryAfterSeconds?: number } })?.data?.retryAfterSeconds
      if (retry) setResponseHeader(event, 'Retry-After', retry)
      throw known ?? error
    }
  })
}

/** What the asker's screens may offer. */
export const abilitiesFor = (actor: Actor) => abilitiesOf(actor.role)
