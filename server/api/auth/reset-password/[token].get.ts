import { readResetLink } from '../../../db/commands/resetPassword'
import { publicRoute } from '../../../utils/apiRoute'

export default publicRoute(async ({ event, db }) => {
  const { email } = await readResetLink(db, getRouterParam(event, 'token'))
  return { email }
})
