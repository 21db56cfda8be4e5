import { sendAgain } from '../../../db/commands/sendAgain'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see messages',
  on: { message: 'messageId' },
  handle: ({ db, actor, message }) => sendAgain(db, actor, message),
})
