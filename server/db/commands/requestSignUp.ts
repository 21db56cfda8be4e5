import type { Db } from '../connect'
import { signUpMail } from '../../utils/accountMails'
import { now, nowInstant } from '../../utils/clock'
import { newLinkToken } from '../../utils/linkToken'
import { newId } from '../../utils/newId'
import type { SignUp } from '../../../shared/schemas/account'
import { queueMessage } from './queueMessage'

const DAY_MS = 86_400_000

/** Mails a link to begin with. Nobody looks whether the address has an account, so nobody can tell by the answer or its time. */
export async function requestSignUp(db: Db, input: SignUp): Promise<void> {
  const { token, tokenHash } = newLinkToken()
  const at = now().getTime()
  await db.transaction().execute(async (trx) => {
    await trx.deleteFrom('signUp').where('expiresAt', '<', new Date(at - 30 * DAY_MS).toISOString()).execute()
    const id = newId()
    await trx.insertInto('signUp').values({
      id, email: input.email, name: input.name, organisationName: input.organisationName, timeZone: input.timeZone ?? null,
      tokenHash, expiresAt: new Date(at + DAY_MS).toISOString(), createdAt: nowInstant(),
    }).execute()
    await queueMessage(trx, {
      organisationId: null, userId: null, kind: 'sign-up', mailClass: 'account', toAddress: input.email,
      content: signUpMail(input, token), dedupeKey: `sign-up:${id}`,
    })
  })
}
