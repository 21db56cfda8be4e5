import type { Db } from '../connect'
import { findUserByEmail } from '../queries/accounts'
import { passwordResetMail } from '../../utils/accountMails'
import { atLeast } from '../../utils/atLeast'
import { now, nowInstant } from '../../utils/clock'
import { hashLinkToken, isLinkToken, newLinkToken } from '../../utils/linkToken'
import { newId } from '../../utils/newId'
import { isPasswordOfNobody, makePasswordHash } from '../../utils/passwords'
import { linkClosed } from '../../utils/problems'
import { queueMessage } from './queueMessage'
import { setPassword, type NewSession } from './setPassword'

const HOUR_MS = 3_600_000
/** Well above what the scrypt and the writes need (60 to 300 ms on two busy cores), so that both cases take this long. Ours. */
const ANSWER_AFTER_MS = 750

/** The same answer after the same time whether or not anybody has this address. */
export async function requestPasswordReset(db: Db, email: string): Promise<void> {
  await atLeast(ANSWER_AFTER_MS, sendResetLink(db, email))
}

async function sendResetLink(db: Db, email: string): Promise<void> {
  const user = await findUserByEmail(db, email)
  const { token, tokenHash } = newLinkToken()
  await isPasswordOfNobody(token)
  if (!user) return
  await db.transaction().execute(async (trx) => {
    const id = newId()
    await trx.insertInto('passwordReset').values({
      id, userId: user.id, tokenHash, expiresAt: new Date(now().getTime() + HOUR_MS).toISOString(), usedAt: null, createdAt: nowInstant(),
    }).execute()
    await queueMessage(trx, {
      organisationId: null, userId: user.id, kind: 'password-reset', mailClass: 'account', toAddress: user.email,
      content: passwordResetMail(user.name, token), dedupeKey: `password-reset:${id}`,
    })
  })
}

/** Whose password the link would set; 404 or 410 when it opens nothing. */
export async function readResetLink(db: Db, token: string | undefined): Promise<{ id: string, userId: string, email: string }> {
  const row = isLinkToken(token)
    ? await db.selectFrom('passwordReset as r').innerJoin('appUser as u', 'u.id', 'r.userId')
        .select(['r.id', 'r.userId', 'r.usedAt', 'r.expiresAt', 'u.email']).where('r.tokenHash', '=', hashLinkToken(token)).executeTakeFirst()
    : undefined
  if (!row) throw linkClosed('link-unknown', 'This link is not one of ours. Perhaps the mail program cut it off.')
  if (row.usedAt) throw linkClosed('link-used', 'This link has been used, or the password was changed since.')
  if (row.expiresAt <= nowInstant()) throw linkClosed('link-expired', 'This link was good for one hour, and that is over.')
  return { id: row.id, userId: row.userId, email: row.email }
}

/** Sets the password once: of two uses at the same moment one finds the link used. */
export async function resetPassword(db: Db, token: string | undefined, password: string): Promise<NewSession> {
  const link = await readResetLink(db, token)
  const passwordHash = await makePasswordHash(password)
  return db.transaction().execute(async (trx) => {
    const taken = await trx.updateTable('passwordReset').set({ usedAt: nowInstant() })
      .where('id', '=', link.id).where('usedAt', 'is', null).returning('id').executeTakeFirst()
    if (!taken) throw linkClosed('link-used', 'This link has been used, or the password was changed since.')
    return setPassword(trx, link.userId, passwordHash)
  })
}
