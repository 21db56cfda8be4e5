import { checkSignIn } from '../../db/queries/checkSignIn'
import { SignInInput } from '../../../shared/schemas/account'
import { publicRoute } from '../../utils/apiRoute'
import { forgetTries, giveTryBack, remoteAddress, takeTry } from '../../utils/attempts'
import { readBodyAs } from '../../utils/readBodyAs'
import { openSession } from '../../utils/session'

export default publicRoute(async ({ event, db }) => {
  const body = await readBodyAs(event, SignInInput)
  const remote = remoteAddress(event)
  await takeTry('sign-in by remote', remote)
  await takeTry('sign-in by address', body.email)
  const user = await checkSignIn(db, body)
  await Promise.all([forgetTries('sign-in by address', body.email), giveTryBack('sign-in by remote', remote)])
  await openSession(event, user)
  return { signedIn: true }
})
