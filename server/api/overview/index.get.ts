import { readOverview } from '../../db/queries/readOverview'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see portfolio',
  handle: ({ db, actor }) => readOverview(db, actor),
})
