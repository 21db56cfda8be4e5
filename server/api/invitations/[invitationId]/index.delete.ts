import { revokeInvitation } from '../../../db/commands/tendInvitation'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'manage people',
  on: { invitation: 'invitationId' },
  handle: ({ db, actor, invitation }) => revokeInvitation(db, actor, invitation),
})
