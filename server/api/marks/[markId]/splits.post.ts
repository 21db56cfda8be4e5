import { splitMark } from '../../../db/commands/splitMark'
import { MarkSplit } from '../../../../shared/schemas/mark'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit mark',
  on: { mark: 'markId' },
  body: MarkSplit,
  handle: ({ db, actor, mark, body }) => splitMark(db, actor, mark, body),
})
