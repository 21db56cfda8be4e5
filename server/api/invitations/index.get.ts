import { listInvitations } from '../../db/queries/invitations'
import { InvitationsQuery } from '../../../shared/schemas/invitation'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'manage people',
  query: InvitationsQuery,
  handle: ({ db, actor, query }) => listInvitations(db, actor, query),
})
