import { findMarkPage } from '../../../db/queries/markPage'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see mark',
  on: { mark: 'markId' },
  kept: true,
  handle: ({ db, actor, mark }) => findMarkPage(db, actor, mark.id),
})
