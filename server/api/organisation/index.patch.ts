import { editOrganisation } from '../../db/commands/editOrganisation'
import { OrganisationEdit } from '../../../shared/schemas/organisation'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'manage organisation',
  body: OrganisationEdit,
  handle: ({ db, actor, body }) => editOrganisation(db, actor, body),
})
