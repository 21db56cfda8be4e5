import { endMembership } from '../../db/commands/endMembership'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'manage people',
  on: { membership: 'membershipId' },
  handle: ({ db, actor, membership }) => endMembership(db, actor, membership),
})
