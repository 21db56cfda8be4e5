import { readOverview } from '../../db/queries/readOverview'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see portfolio',
  kept: true,
  handle: ({ db, actor }) => readOverview(db, actor),
})
