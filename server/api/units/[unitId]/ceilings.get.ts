import { findUnitCeilings } from '../../../db/queries/unitCeilings'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see mark',
  on: { unit: 'unitId' },
  kept: true,
  handle: ({ db, actor, unit }) => findUnitCeilings(db, actor, unit),
})
