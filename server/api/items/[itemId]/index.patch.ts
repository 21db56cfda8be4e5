import { AtticItemEdit } from '../../../../shared/schemas/atticItem'
import { editItem } from '../../../db/commands/changeItems'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { item: 'itemId' },
  body: AtticItemEdit,
  handle: ({ db, actor, item, body }) => editItem(db, actor, item, body),
})
