import { AtticListQuery } from '../../../shared/schemas/attic'
import { listAttics } from '../../db/queries/attics'
import { apiRoute } from '../../utils/apiRoute'
import { asPage } from '../../utils/keyset'

export default apiRoute({
  can: 'see portfolio',
  query: AtticListQuery,
  handle: async ({ db, actor, query }) =>
    asPage(await listAttics(db, actor.organisationId, query), query.limit, row => ({ name: row.name, id: row.id })),
})
