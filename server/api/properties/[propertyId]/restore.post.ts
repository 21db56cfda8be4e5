import { restoreProperty } from '../../../db/commands/archiveHome'
import { SeenVersion } from '../../../../shared/schemas/home'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { property: 'propertyId' },
  body: SeenVersion,
  handle: ({ db, actor, property, body }) => restoreProperty(db, actor, property, body),
})
