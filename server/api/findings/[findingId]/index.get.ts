import { findFindingView } from '../../../db/queries/findings'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see finding',
  on: { finding: 'findingId' },
  kept: true,
  handle: ({ db, actor, finding }) => findFindingView(db, actor, finding.id),
})
