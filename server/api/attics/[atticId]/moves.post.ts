import { AtticItemMoves } from '../../../../shared/schemas/atticItem'
import { moveItems } from '../../../db/commands/changeItems'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: AtticItemMoves,
  handle: ({ db, actor, attic, body }) => moveItems(db, actor, attic, body),
})
