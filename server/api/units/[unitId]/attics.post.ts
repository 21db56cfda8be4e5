import { createAttic } from '../../../db/commands/createAttic'
import { AtticCreate } from '../../../../shared/schemas/home'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { unit: 'unitId' },
  body: AtticCreate,
  handle: ({ db, actor, unit, body }) => createAttic(db, actor, unit, body),
})
