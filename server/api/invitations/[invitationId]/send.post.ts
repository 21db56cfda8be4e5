import { sendInvitationAgain } from '../../../db/commands/tendInvitation'
import { apiRoute } from '../../../utils/apiRoute'
import { takeTry } from '../../../utils/attempts'

export default apiRoute({
  can: 'manage people',
  on: { invitation: 'invitationId' },
  async handle({ db, actor, invitation }) {
    await takeTry('invite again by invitation', invitation.id)
    return sendInvitationAgain(db, actor, invitation)
  },
})
