import { invitePerson } from '../../db/commands/invitePerson'
import { InvitationInput } from '../../../shared/schemas/invitation'
import { apiRoute } from '../../utils/apiRoute'
import { takeTry } from '../../utils/attempts'

export default apiRoute({
  can: 'manage people',
  body: InvitationInput,
  async handle({ event, db, actor, body }) {
    await takeTry('invite by organisation', actor.organisationId)
    setResponseStatus(event, 201)
    return invitePerson(db, actor, body)
  },
})
