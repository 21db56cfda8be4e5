import type { Db } from '../connect'
import { findUserByEmail } from '../queries/accounts'
import { isPasswordOf, makePasswordHash } from '../../utils/passwords'
import { problem } from '../../utils/problems'
import type { SignUp } from '../../../shared/schemas/account'
import { appendRecord } from './appendRecord'
import { addOrganisation, addUser, joinOrganisation } from './addPerson'

export interface SignedUp { user: { id: string, sessionEpoch: number }, organisationId: string }

/** An organisation and its owner. Somebody who has an account already proves it with its password and owns one more. */
export async function signUp(db: Db, input: SignUp): Promise<SignedUp> {
  const known = await findUserByEmail(db, input.email)
  if (known && !await isPasswordOf(known.passwordHash, input.password)) {
    throw problem(409, 'address-in-use', 'There is an account with this address already.', {
      fields: { email: 'This address has an account. Sign in with it, or give its password here to add another organisation.' },
    })
  }
  const passwordHash = known ? '' : await makePasswordHash(input.password)
  return db.transaction().execute(async (trx) => {
    const user = known ?? await addUser(trx, { email: input.email, name: input.name, passwordHash })
    const organisationId = await addOrganisation(trx, { name: input.organisationName, timeZone: input.timeZone })
    const actor = { userId: user.id, name: user.name }
    await appendRecord(trx, actor, {
      organisationId, unitId: null, action: 'organisation added', subjectKind: 'organisation', subjectId: organisationId, after: { name: input.organisationName },
    })
    await joinOrganisation(trx, actor, { organisationId, user, role: 'owner' })
    return { user: { id: user.id, sessionEpoch: user.sessionEpoch }, organisationId }
  })
}
