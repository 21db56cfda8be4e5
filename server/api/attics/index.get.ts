import { AtticListQuery } from '../../../shared/schemas/attic'
import { listAttics } from '../../db/queries/attics'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see portfolio',
  query: AtticListQuery,
  handle: ({ db, actor, query }) => listAttics(db, actor.organisationId, query),
})
