import { undoJoining } from '../../../db/commands/joinMarks'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit mark',
  on: { mark: 'markId' },
  handle: ({ db, actor, mark }) => undoJoining(db, actor, mark),
})
