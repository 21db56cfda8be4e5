import type { Db } from '../connect'
import { isPasswordOf, isPasswordOfNobody } from '../../utils/passwords'
import { problem } from '../../utils/problems'
import type { SignIn } from '../../../shared/schemas/account'
import { findUserByEmail } from './accounts'

/** The account that address and password open. One select and one scrypt whether or not the address is known. */
export async function checkSignIn(db: Db, { email, password }: SignIn): Promise<{ id: string, sessionEpoch: number }> {
  const user = await findUserByEmail(db, email)
  const opens = user ? await isPasswordOf(user.passwordHash, password) : await isPasswordOfNobody(password)
  if (!user || !opens) throw problem(401, 'wrong-sign-in', 'This address and this password do not go together.')
  return user
}
