import { publicRoute } from '../../utils/apiRoute'

/** Also for people whose session has ended elsewhere: the cookie goes in any case. */
export default publicRoute(async ({ event }) => {
  await clearUserSession(event)
  return { signedOut: true }
})
