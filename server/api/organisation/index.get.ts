import { findSettings } from '../../db/queries/organisations'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see settings',
  handle: ({ db, actor }) => findSettings(db, actor),
})
