import { createRoom } from '../../../db/commands/createRoom'
import { RoomCreate } from '../../../../shared/schemas/room'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { unit: 'unitId' },
  body: RoomCreate,
  handle: ({ db, actor, unit, body }) => createRoom(db, actor, unit, body),
})
