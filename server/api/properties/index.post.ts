import { createProperty } from '../../db/commands/createProperty'
import { PropertyCreate } from '../../../shared/schemas/home'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  body: PropertyCreate,
  handle: ({ db, actor, body }) => createProperty(db, actor, body),
})
