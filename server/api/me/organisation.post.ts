import { readMe } from '../../db/queries/accounts'
import { SwitchOrganisationInput } from '../../../shared/schemas/account'
import { apiRoute } from '../../utils/apiRoute'
import { moveSession } from '../../utils/session'

export default apiRoute({
  can: 'use account',
  body: SwitchOrganisationInput,
  handle: async ({ event, db, body }) => readMe(db, await moveSession(event, db, body.organisationId)),
})
