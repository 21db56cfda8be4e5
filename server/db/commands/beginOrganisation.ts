import type { Db, Trx } from '../connect'
import { findUserByEmail } from '../queries/accounts'
import { nowInstant } from '../../utils/clock'
import { hashLinkToken, isLinkToken } from '../../utils/linkToken'
import { isPasswordOf, makePasswordHash } from '../../utils/passwords'
import { linkClosed, problem, unsound } from '../../utils/problems'
import { NewPasswordInput } from '../../../shared/schemas/account'
import type { Beginning } from '../../../shared/types/people'
import { addOrganisation, addUser, joinOrganisation } from './addPerson'
import { appendRecord } from './appendRecord'

export interface Begun { user: { id: string, sessionEpoch: number }, organisationId: string }

/** What the mailed link would begin; 404 or 410 when it opens nothing. */
export async function readBeginning(db: Db, token: string | undefined): Promise<Beginning & { id: string, timeZone: string | null }> {
  const row = isLinkToken(token)
    ? await db.selectFrom('signUp as s').leftJoin('appUser as u', 'u.email', 's.email')
        .select(['s.id', 's.email', 's.name', 's.organisationName', 's.timeZone', 's.usedAt', 's.expiresAt', 'u.id as userId'])
        .where('s.tokenHash', '=', hashLinkToken(token)).executeTakeFirst()
    : undefined
  if (!row) throw linkClosed('link-unknown', 'This link is not one of ours. Perhaps the mail program cut it off.')
  if (row.usedAt) throw linkClosed('link-used', 'This link has been used. Sign in to go on.')
  if (row.expiresAt <= nowInstant()) throw linkClosed('link-expired', 'This link was good for one day, and that is over.')
  const { id, email, name, organisationName, timeZone } = row
  return { id, email, name, organisationName, timeZone, hasAccount: row.userId !== null }
}

/**
 * An organisation and its owner. The password is chosen by whoever reads the mail, never by whoever typed the address;
 * somebody who has an account gives the one it has and owns one organisation more.
 */
export async function beginOrganisation(db: Db, token: string | undefined, password: string): Promise<Begun> {
  const beginning = await readBeginning(db, token)
  const owner = await ownerOf(db, beginning, password)
  return db.transaction().execute(async (trx) => {
    const taken = await trx.updateTable('signUp').set({ usedAt: nowInstant() })
      .where('id', '=', beginning.id).where('usedAt', 'is', null).returning('id').executeTakeFirst()
    if (!taken) throw linkClosed('link-used', 'This link has been used. Sign in to go on.')
    return plantOrganisation(trx, beginning, await owner(trx))
  })
}

type Owner = Awaited<ReturnType<typeof addUser>>

/** The slow part of it, scrypt, is done before the transaction. */
async function ownerOf(db: Db, { email, name }: Beginning, password: string): Promise<(trx: Trx) => Promise<Owner>> {
  const known = await findUserByEmail(db, email)
  if (known) {
    if (!await isPasswordOf(known.passwordHash, password)) throw problem(401, 'wrong-sign-in', 'This is not the password of your account.', { fields: { password: 'This is not the password of your account.' } })
    return async () => known
  }
  const sound = NewPasswordInput.safeParse(password)
  if (!sound.success) throw unsound({ password: sound.error.issues[0]!.message })
  const passwordHash = await makePasswordHash(sound.data)
  return trx => addUser(trx, { email, name, passwordHash })
}

async function plantOrganisation(trx: Trx, { organisationName, timeZone }: { organisationName: string, timeZone: string | null }, user: Owner): Promise<Begun> {
  const organisationId = await addOrganisation(trx, { name: organisationName, timeZone: timeZone ?? undefined })
  const actor = { userId: user.id, name: user.name }
  await appendRecord(trx, actor, {
    organisationId, unitId: null, action: 'organisation added', subjectKind: 'organisation', subjectId: organisationId, after: { name: organisationName },
  })
  await joinOrganisation(trx, actor, { organisationId, user, role: 'owner' })
  return { user: { id: user.id, sessionEpoch: user.sessionEpoch }, organisationId }
}
