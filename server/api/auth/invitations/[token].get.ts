import { readOffer } from '../../../db/queries/invitations'
import { publicRoute } from '../../../utils/apiRoute'
import { sessionUser } from '../../../utils/session'

export default publicRoute(async ({ event, db }) => {
  const signedIn = await sessionUser(event, db)
  return readOffer(db, getRouterParam(event, 'token'), signedIn?.email ?? null)
})
