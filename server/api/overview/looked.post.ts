import { noteLooked } from '../../db/queries/overview'
import { apiRoute } from '../../utils/apiRoute'
import { nowInstant } from '../../utils/clock'

export default apiRoute({
  can: 'see portfolio',
  handle: async ({ db, actor }) => {
    await noteLooked(db, actor.organisationId, actor.userId, nowInstant())
    return { noted: true }
  },
})
