import { acceptInvitation } from '../../../db/commands/acceptInvitation'
import { AcceptInput } from '../../../../shared/schemas/invitation'
import { publicRoute } from '../../../utils/apiRoute'
import { remoteAddress, takeTry } from '../../../utils/attempts'
import { readBodyAs } from '../../../utils/readBodyAs'
import { openSession, sessionUser } from '../../../utils/session'

export default publicRoute(async ({ event, db }) => {
  const body = await readBodyAs(event, AcceptInput)
  await takeTry('token by remote', remoteAddress(event))
  const { user, organisationId, startPage } = await acceptInvitation(db, getRouterParam(event, 'token'), body, (await sessionUser(event, db))?.id)
  await openSession(event, user, organisationId)
  return { startPage }
})
