import { requestReview } from '../../db/commands/requestReview'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'run review',
  handle: ({ db, actor, event }) => {
    setResponseStatus(event, 202)
    return requestReview(db, actor)
  },
})
