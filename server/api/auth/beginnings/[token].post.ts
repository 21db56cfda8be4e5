import { beginOrganisation } from '../../../db/commands/beginOrganisation'
import { BeginInput } from '../../../../shared/schemas/account'
import { publicRoute } from '../../../utils/apiRoute'
import { remoteAddress, takeTry } from '../../../utils/attempts'
import { readBodyAs } from '../../../utils/readBodyAs'
import { openSession } from '../../../utils/session'

export default publicRoute(async ({ event, db }) => {
  const { password } = await readBodyAs(event, BeginInput)
  await takeTry('token by remote', remoteAddress(event))
  const { user, organisationId } = await beginOrganisation(db, getRouterParam(event, 'token'), password)
  await openSession(event, user, organisationId)
  setResponseStatus(event, 201)
  return { organisationId }
})
