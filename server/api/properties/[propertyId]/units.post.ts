import { createUnit } from '../../../db/commands/createUnit'
import { UnitCreate } from '../../../../shared/schemas/home'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { property: 'propertyId' },
  body: UnitCreate,
  handle: ({ db, actor, property, body }) => createUnit(db, actor, property, body),
})
