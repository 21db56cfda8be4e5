import { listProperties } from '../../db/queries/properties'
import { HomesQuery } from '../../../shared/schemas/listQuery'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see property',
  query: HomesQuery,
  kept: true,
  handle: ({ db, actor, query }) => listProperties(db, actor, query),
})
