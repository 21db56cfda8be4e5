import { findNoticesOfUnit } from '../../../db/queries/notices'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see notice',
  on: { unit: 'unitId' },
  kept: true,
  handle: ({ db, actor, unit }) => findNoticesOfUnit(db, actor, unit.id),
})
