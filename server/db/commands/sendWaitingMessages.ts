import { sql, type Selectable } from 'kysely'
import type { Db } from '../connect'
import type { MessageTable } from '../schema/upkeep'
import { now, nowInstant } from '../../utils/clock'
import type { Mailer, SendOutcome } from '../../utils/mailer'

const MINUTE = 60
const HOUR = 60 * MINUTE
/** Ours: waits before the second, third … try, in seconds; a day and a quarter in all. After the last the message has failed. */
export const RETRY_AFTER_S = [5, MINUTE, 5 * MINUTE, 15 * MINUTE, 30 * MINUTE, HOUR, 2 * HOUR, 4 * HOUR, 8 * HOUR, 14 * HOUR] as const
/** Longer than the mailer's time-outs together: nobody else takes a message that is being sent. */
const LEASE_S = 3 * MINUTE
const AT_ONCE = 5

export interface SendingCounts { sent: number, delayed: number, failed: number }

type Claimed = Pick<Selectable<MessageTable>, 'id' | 'userId' | 'toAddress' | 'subject' | 'textBody' | 'htmlBody' | 'attempts'>

/**
 * Sends what is due, a few at once, until none is left or the mail server is away. Any number of servers may run it together:
 * each message is claimed by one of them. A crash between sending and noting it sends the same Message-ID again, never loses it.
 */
export async function sendWaitingMessages(db: Db, mailer: Mailer): Promise<SendingCounts> {
  const counts: SendingCounts = { sent: 0, delayed: 0, failed: 0 }
  for (;;) {
    const claimed = await claimMessages(db)
    if (claimed.length === 0) return counts
    const outcomes = await Promise.all(claimed.map(async message => ({ message, outcome: await mailer.send(message) })))
    for (const { message, outcome } of outcomes) counts[await noteOutcome(db, message, outcome)] += 1
    if (outcomes.every(({ outcome }) => outcome.kind === 'away')) return counts
  }
}

async function claimMessages(db: Db): Promise<Claimed[]> {
  const due = db.selectFrom('message').select('id')
    .where('state', '=', 'queued').where('nextAttemptAt', '<=', nowInstant())
    .orderBy(sql`case mail_class when 'safety' then 0 when 'account' then 1 when 'duty' then 2 else 3 end`).orderBy('nextAttemptAt')
    .limit(AT_ONCE).forUpdate().skipLocked()
  return db.updateTable('message').set(eb => ({ attempts: eb('attempts', '+', 1), nextAttemptAt: secondsFromNow(LEASE_S) }))
    .where('id', 'in', due).where('state', '=', 'queued')
    .returning(['id', 'userId', 'toAddress', 'subject', 'textBody', 'htmlBody', 'attempts']).execute()
}

async function noteOutcome(db: Db, message: Claimed, outcome: SendOutcome): Promise<keyof SendingCounts> {
  if (outcome.kind === 'sent') {
    await db.updateTable('message').set({ state: 'sent', sentAt: nowInstant(), lastError: null }).where('id', '=', message.id).execute()
    await noteRefusal(db, message, null)
    return 'sent'
  }
  const wait = outcome.kind === 'refused' ? undefined : RETRY_AFTER_S[message.attempts - 1]
  await db.updateTable('message')
    .set({ lastError: outcome.reason, ...(wait === undefined ? { state: 'failed' as const } : { nextAttemptAt: secondsFromNow(wait) }) })
    .where('id', '=', message.id).execute()
  if (outcome.kind === 'refused') await noteRefusal(db, message, nowInstant())
  return wait === undefined ? 'failed' : 'delayed'
}

/** An address that was refused for good is no working contact until a mail to it is taken again. */
async function noteRefusal(db: Db, { userId, toAddress }: Claimed, refusedAt: string | null) {
  if (!userId) return
  await db.updateTable('appUser').set({ mailRefusedAt: refusedAt })
    .where('id', '=', userId).where('email', '=', toAddress)
    .where('mailRefusedAt', refusedAt ? 'is' : 'is not', null).execute()
}

/** When the next waiting message may be tried, so that a refusal is not left until the minute's job. */
export async function nextAttemptAt(db: Db): Promise<string | undefined> {
  const row = await db.selectFrom('message').select(eb => eb.fn.min('nextAttemptAt').as('at')).where('state', '=', 'queued').executeTakeFirst()
  return row?.at ?? undefined
}

const secondsFromNow = (seconds: number) => new Date(now().getTime() + seconds * 1000).toISOString()
