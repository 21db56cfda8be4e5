import { resetPassword } from '../../../db/commands/resetPassword'
import { ResetPasswordInput } from '../../../../shared/schemas/account'
import { publicRoute } from '../../../utils/apiRoute'
import { remoteAddress, takeTry } from '../../../utils/attempts'
import { readBodyAs } from '../../../utils/readBodyAs'
import { openSession } from '../../../utils/session'

export default publicRoute(async ({ event, db }) => {
  const { password } = await readBodyAs(event, ResetPasswordInput)
  await takeTry('token by remote', remoteAddress(event))
  await openSession(event, await resetPassword(db, getRouterParam(event, 'token'), password))
  return { changed: true }
})
