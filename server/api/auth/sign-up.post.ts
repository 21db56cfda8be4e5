import { requestSignUp } from '../../db/commands/requestSignUp'
import { SignUpInput } from '../../../shared/schemas/account'
import { publicRoute } from '../../utils/apiRoute'
import { remoteAddress, takeTry } from '../../utils/attempts'
import { readBodyAs } from '../../utils/readBodyAs'

export default publicRoute(async ({ event, db }) => {
  const body = await readBodyAs(event, SignUpInput)
  await takeTry('sign-up by remote', remoteAddress(event))
  await takeTry('sign-up by address', body.email)
  await requestSignUp(db, body)
  setResponseStatus(event, 202)
  return { taken: true }
})
