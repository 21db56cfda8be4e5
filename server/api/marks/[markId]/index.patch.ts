import { editMark } from '../../../db/commands/editMark'
import { MarkEdit } from '../../../../shared/schemas/mark'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit mark',
  on: { mark: 'markId' },
  body: MarkEdit,
  handle: ({ db, actor, mark, body }) => editMark(db, actor, mark, body),
})
