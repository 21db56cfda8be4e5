import { AtticListQuery } from '../../../shared/schemas/attic'
import { listAttics } from '../../db/queries/attics'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see attic',
  query: AtticListQuery,
  kept: true,
  handle: ({ db, actor, query }) => listAttics(db, actor, query),
})
