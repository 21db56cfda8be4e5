import { archiveUnit } from '../../../db/commands/archiveHome'
import { SeenVersion } from '../../../../shared/schemas/home'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { unit: 'unitId' },
  body: SeenVersion,
  handle: ({ db, actor, unit, body }) => archiveUnit(db, actor, unit, body),
})
