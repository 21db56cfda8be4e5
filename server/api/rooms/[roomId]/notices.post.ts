import { raiseNotice } from '../../../db/commands/raiseNotice'
import { NoticeInput } from '../../../../shared/schemas/notice'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'raise notice',
  on: { room: 'roomId' },
  body: NoticeInput,
  handle: ({ db, actor, room, body }) => raiseNotice(db, actor, room, body),
})
