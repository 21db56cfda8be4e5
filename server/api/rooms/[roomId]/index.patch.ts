import { editRoom } from '../../../db/commands/editHome'
import { RoomEdit } from '../../../../shared/schemas/room'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { room: 'roomId' },
  body: RoomEdit,
  handle: ({ db, actor, room, body }) => editRoom(db, actor, room, body),
})
