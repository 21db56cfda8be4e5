import { requestPasswordReset } from '../../db/commands/resetPassword'
import { ForgottenPasswordInput } from '../../../shared/schemas/account'
import { publicRoute } from '../../utils/apiRoute'
import { remoteAddress, takeTry } from '../../utils/attempts'
import { readBodyAs } from '../../utils/readBodyAs'

export default publicRoute(async ({ event, db }) => {
  const { email } = await readBodyAs(event, ForgottenPasswordInput)
  await takeTry('forgotten password by remote', remoteAddress(event))
  await takeTry('forgotten password by address', email)
  await requestPasswordReset(db, email)
  return { taken: true }
})
