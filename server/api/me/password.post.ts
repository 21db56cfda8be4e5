import { changePassword } from '../../db/commands/setPassword'
import { ChangePasswordInput } from '../../../shared/schemas/account'
import { apiRoute } from '../../utils/apiRoute'
import { takeTry } from '../../utils/attempts'
import { openSession } from '../../utils/session'

export default apiRoute({
  can: 'use account',
  body: ChangePasswordInput,
  async handle({ event, db, actor, body }) {
    await takeTry('change password by person', actor.userId)
    await openSession(event, await changePassword(db, actor, body), actor.organisationId)
    return { changed: true }
  },
})
