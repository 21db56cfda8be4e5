import { archiveRoom } from '../../../db/commands/archiveHome'
import { SeenVersion } from '../../../../shared/schemas/home'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { room: 'roomId' },
  body: SeenVersion,
  handle: ({ db, actor, room, body }) => archiveRoom(db, actor, room, body),
})
