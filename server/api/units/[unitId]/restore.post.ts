import { restoreUnit } from '../../../db/commands/archiveHome'
import { SeenVersion } from '../../../../shared/schemas/home'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { unit: 'unitId' },
  body: SeenVersion,
  handle: ({ db, actor, unit, body }) => restoreUnit(db, actor, unit, body),
})
