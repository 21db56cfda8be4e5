import { listUnits } from '../../db/queries/units'
import { UnitsQuery } from '../../../shared/schemas/listQuery'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see unit',
  query: UnitsQuery,
  kept: true,
  handle: ({ db, actor, query }) => listUnits(db, actor, query),
})
