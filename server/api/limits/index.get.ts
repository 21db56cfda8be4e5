import { findLimitsView } from '../../db/queries/limits'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see ledger',
  handle: ({ db, actor }) => findLimitsView(db, actor),
})
