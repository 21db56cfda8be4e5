import { AtticItemRemoval } from '../../../../shared/schemas/atticItem'
import { removeItem } from '../../../db/commands/changeItems'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { item: 'itemId' },
  body: AtticItemRemoval,
  handle: ({ db, actor, item, body }) => removeItem(db, actor, item, body),
})
