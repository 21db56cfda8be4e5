import { joinMarks } from '../../../db/commands/joinMarks'
import { MarkJoining } from '../../../../shared/schemas/mark'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit mark',
  on: { mark: 'markId' },
  body: MarkJoining,
  handle: ({ db, actor, mark, body }) => joinMarks(db, actor, mark, body),
})
