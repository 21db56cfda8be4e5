import type { H3Event } from 'h3'
import { LRUCache } from 'lru-cache'
import type { Db } from '../db/connect'
import { findStateSeen } from '../db/queries/changes'
import { now } from './clock'
import { sessionIdentity } from './session'

declare module 'h3' {
  interface H3EventContext {
    stateSeen?: Promise<string | undefined>
    /** The page being made is the same for this person (or for anybody) until the state they see changes. */
    mayKeepPage?: boolean
    keepPageAs?: KeptPlace
    /** Of the page's content policy. */
    nonce?: string
  }
}

/** Where an answer is kept, and the state it is true for. */
export interface KeptPlace { key: string, state: string }

interface Kept { state: string, text: string }

const MIB = 1024 * 1024

/** Ours. Answers that nobody asks for again make room for the others. */
export const keptStore = (mib: number) => new LRUCache<string, Kept>({
  maxSize: mib * MIB, maxEntrySize: 4 * MIB, sizeCalculation: ({ text }, key) => 2 * (text.length + key.length) + 64,
})

const answers = keptStore(32)

/** What is said of "now" in an answer may be a minute old, never older. */
const minute = () => Math.floor(now().getTime() / 60_000)

/** One look at the database a request, whatever asks: what a page reads inside the server shares the page's context. */
export function stateSeenBy(event: H3Event, db: Db): Promise<string | undefined> {
  return event.context.stateSeen ??= readState(event, db)
}

async function readState(event: H3Event, db: Db) {
  const identity = await sessionIdentity(event)
  const state = identity && await findStateSeen(db, identity)
  return state && `${state}.${minute()}`
}

/** The person's own place for this address; undefined when signed out, or when the answer is asked for anew. */
export async function placeFor(event: H3Event, db: Db): Promise<KeptPlace | undefined> {
  if (isAskedAnew(event)) return undefined
  const state = await stateSeenBy(event, db)
  const identity = state && await sessionIdentity(event)
  return identity && state ? { key: `${identity.userId} ${identity.epoch} ${identity.organisationId ?? ''} ${event.path}`, state } : undefined
}

/** RFC 9111 §5.2.1.4: a kept answer must not be used then. */
export const isAskedAnew = (event: H3Event) => (getHeader(event, 'cache-control') ?? '').includes('no-cache')

export const placeForAnybody = (event: H3Event): KeptPlace => ({ key: event.path, state: String(minute()) })

export function readKept(store: ReturnType<typeof keptStore>, place: KeptPlace): string | undefined {
  const kept = store.get(place.key)
  return kept?.state === place.state ? kept.text : undefined
}

/**
 * The answer to a GET, made only when something the asker could see has changed since it was made last.
 * The state is read before the answer is made, so that what is kept is never older than its state says.
 */
export async function keptAnswer(event: H3Event, db: Db, make: () => Promise<unknown>): Promise<unknown> {
  const place = await placeFor(event, db)
  if (!place) return make()
  let text = readKept(answers, place)
  if (text === undefined) {
    text = JSON.stringify(await make())
    answers.set(place.key, { state: place.state, text })
  }
  setResponseHeader(event, 'content-type', 'application/json')
  return text
}
