import { checkSignIn } from '../../db/queries/checkSignIn'
import { SignInInput } from '../../../shared/schemas/account'
import { publicRoute } from '../../utils/apiRoute'
import { withinSignInTries } from '../../utils/attempts'
import { readBodyAs } from '../../utils/readBodyAs'
import { openSession } from '../../utils/session'

export default publicRoute(async ({ event, db }) => {
  const body = await readBodyAs(event, SignInInput)
  await openSession(event, await withinSignInTries(event, body.email, () => checkSignIn(db, body)))
  return { signedIn: true }
})
