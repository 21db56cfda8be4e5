import { AtticItemInput } from '../../../../shared/schemas/atticItem'
import { addItem } from '../../../db/commands/changeItems'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: AtticItemInput,
  handle: ({ db, actor, attic, body }) => addItem(db, actor, attic, body),
})
