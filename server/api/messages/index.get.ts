import { listMessages } from '../../db/queries/messages'
import { MessagesQuery } from '../../../shared/schemas/organisation'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see messages',
  query: MessagesQuery,
  handle: ({ db, actor, query }) => listMessages(db, actor, query),
})
