import { findNeighbourView } from '../../../db/queries/neighbours'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see mark',
  on: { mark: 'markId' },
  kept: true,
  handle: ({ db, actor, mark }) => findNeighbourView(db, actor, mark),
})
