import { createHash } from 'node:crypto'
import type { H3Event } from 'h3'
import { getHeader, getRequestIP } from 'h3'
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible'
import type pg from 'pg'
import { tooMany } from './problems'
import { useConnection } from './useDb'

/** Tries allowed within a window; ours. A whole building may share one remote address, so those are wider. */
export const ATTEMPT_LIMITS = {
  'sign-in by address': { points: 10, minutes: 15 },
  'sign-in by remote': { points: 60, minutes: 15 },
  'sign-up by address': { points: 5, minutes: 60 },
  'sign-up by remote': { points: 60, minutes: 60 },
  'forgotten password by address': { points: 3, minutes: 60 },
  'forgotten password by remote': { points: 30, minutes: 60 },
  'token by remote': { points: 60, minutes: 15 },
  'change password by person': { points: 10, minutes: 15 },
  'invite by organisation': { points: 200, minutes: 24 * 60 },
  'invite again by invitation': { points: 5, minutes: 24 * 60 },
} as const satisfies Record<string, { points: number, minutes: number }>

export type AttemptKind = keyof typeof ATTEMPT_LIMITS

const limitersOf = new WeakMap<pg.Pool, Map<AttemptKind, RateLimiterPostgres>>()

/** Counts one try; 429 with Retry-After when there were too many. The count stands in the database, so it holds across servers. */
export async function takeTry(kind: AttemptKind, who: string): Promise<void> {
  try { await limiterOf(kind).consume(keyOf(who)) }
  catch (refused) {
    if (refused instanceof RateLimiterRes) throw tooMany(Math.max(1, Math.ceil(refused.msBeforeNext / 1000)))
    throw refused
  }
}

/** Counts a sign-in before it is tried, so that many at once count too. One that succeeds is taken off again and clears its address. */
export async function withinSignInTries<T>(event: H3Event, email: string, work: () => Promise<T>): Promise<T> {
  const remote = remoteAddress(event)
  await takeTry('sign-in by remote', remote)
  await takeTry('sign-in by address', email)
  const answer = await work()
  await Promise.all([limiterOf('sign-in by address').delete(keyOf(email)), limiterOf('sign-in by remote').reward(keyOf(remote))])
  return answer
}

function limiterOf(kind: AttemptKind): RateLimiterPostgres {
  const { pool } = useConnection()
  const limiters = limitersOf.get(pool) ?? new Map<AttemptKind, RateLimiterPostgres>()
  limitersOf.set(pool, limiters)
  let limiter = limiters.get(kind)
  if (!limiter) {
    const { points, minutes } = ATTEMPT_LIMITS[kind]
    limiter = new RateLimiterPostgres({
      storeClient: pool, storeType: 'pool', tableName: 'attempt_limit', tableCreated: true,
      keyPrefix: kind, points, duration: minutes * 60, clearExpiredByTimeout: limiters.size === 0,
    })
    limiters.set(kind, limiter)
  }
  return limiter
}

/** Only a digest is kept: the table tells nobody which addresses were tried. */
const keyOf = (who: string) => createHash('sha256').update(who).digest('base64url')

/**
 * Where a request comes from. Behind a proxy the last X-Forwarded-For entry is the one our own proxy wrote;
 * those before it are whatever the asker claimed. IPv6 counts by its /64, which is what one subscriber gets (RFC 6177).
 */
export function remoteAddress(event: H3Event): string {
  const forwarded = process.env.TRUST_PROXY === '1' ? getHeader(event, 'x-forwarded-for')?.split(',').at(-1)?.trim() : undefined
  const address = forwarded || getRequestIP(event) || 'unknown'
  return isWideAddress(address) ? `${firstGroups(address)}::/64` : address.replace(/^::ffff:/i, '')
}

const isWideAddress = (address: string) => address.includes(':') && !/^::ffff:\d+\.\d+\.\d+\.\d+$/i.test(address)

function firstGroups(address: string): string {
  const [head = '', tail = ''] = address.split('::')
  const before = head ? head.split(':') : []
  const after = tail ? tail.split(':') : []
  const filled = address.includes('::') ? [...before, ...Array.from({ length: Math.max(0, 8 - before.length - after.length) }, () => '0'), ...after] : before
  return filled.slice(0, 4).map(group => Number.parseInt(group, 16).toString(16)).join(':')
}
