import { findReviews } from '../../db/queries/reviews'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see settings',
  handle: ({ db, actor }) => findReviews(db, actor),
})
