import { editProperty } from '../../../db/commands/editHome'
import { PropertyEdit } from '../../../../shared/schemas/home'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { property: 'propertyId' },
  body: PropertyEdit,
  handle: ({ db, actor, property, body }) => editProperty(db, actor, property, body),
})
