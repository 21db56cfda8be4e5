import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import { nowInstant } from '../../utils/clock'
import { isPasswordOf, makePasswordHash } from '../../utils/passwords'
import { notSignedIn, unsound } from '../../utils/problems'
import { passwordChangedMail } from '../../utils/accountMails'
import type { ChangePassword } from '../../../shared/schemas/account'
import { queueMessage } from './queueMessage'

export interface NewSession { id: string, sessionEpoch: number }

/** A new password ends every session, uses up every reset link, and says so by mail. */
export async function setPassword(trx: Trx, userId: string, passwordHash: string): Promise<NewSession> {
  const user = await trx.updateTable('appUser')
    .set(eb => ({ passwordHash, sessionEpoch: eb('sessionEpoch', '+', 1) }))
    .where('id', '=', userId).returning(['id', 'name', 'email', 'sessionEpoch']).executeTakeFirstOrThrow()
  await trx.updateTable('passwordReset').set({ usedAt: nowInstant() }).where('userId', '=', userId).where('usedAt', 'is', null).execute()
  await queueMessage(trx, {
    organisationId: null, userId, kind: 'password-changed', mailClass: 'account', toAddress: user.email,
    content: passwordChangedMail(user.name), dedupeKey: `password-changed:${userId}:${user.sessionEpoch}`,
  })
  return user
}

export async function changePassword(db: Db, actor: Actor, { current, password }: ChangePassword): Promise<NewSession> {
  const user = await db.selectFrom('appUser').select(['passwordHash', 'sessionEpoch']).where('id', '=', actor.userId).executeTakeFirst()
  if (!user) throw notSignedIn()
  if (!await isPasswordOf(user.passwordHash, current)) throw unsound({ current: 'This is not your password now.' })
  const passwordHash = await makePasswordHash(password)
  return db.transaction().execute(trx => setPassword(trx, actor.userId, passwordHash))
}
