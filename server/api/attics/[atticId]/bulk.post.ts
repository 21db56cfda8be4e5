import { AtticItemBulk } from '../../../../shared/schemas/atticItem'
import { changeSeveral } from '../../../db/commands/changeSeveral'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: AtticItemBulk,
  handle: ({ db, actor, attic, body }) => changeSeveral(db, actor, attic, body),
})
