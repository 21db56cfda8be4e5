import { findNoticeView } from '../../../db/queries/notices'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see notice',
  on: { notice: 'noticeId' },
  handle: ({ db, actor, notice }) => findNoticeView(db, actor, notice.id),
})
