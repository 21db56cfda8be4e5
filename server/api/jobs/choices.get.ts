import { findJobChoices } from '../../db/queries/jobs'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'edit job',
  kept: true,
  handle: ({ db, actor }) => findJobChoices(db, actor),
})
