import { signUp } from '../../db/commands/signUp'
import { SignUpInput } from '../../../shared/schemas/account'
import { publicRoute } from '../../utils/apiRoute'
import { remoteAddress, takeTry } from '../../utils/attempts'
import { readBodyAs } from '../../utils/readBodyAs'
import { openSession } from '../../utils/session'

export default publicRoute(async ({ event, db }) => {
  const body = await readBodyAs(event, SignUpInput)
  await Promise.all([takeTry('sign-up by remote', remoteAddress(event)), takeTry('sign-in by address', body.email)])
  const { user, organisationId } = await signUp(db, body)
  await openSession(event, user, organisationId)
  setResponseStatus(event, 201)
  return { organisationId }
})
