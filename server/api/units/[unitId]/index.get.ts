import { findUnitPage } from '../../../db/queries/unitPage'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see unit',
  on: { unit: 'unitId' },
  kept: true,
  handle: ({ db, actor, unit }) => findUnitPage(db, actor, unit.id),
})
