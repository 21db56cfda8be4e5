import { orderRooms } from '../../../db/commands/orderRooms'
import { RoomOrder } from '../../../../shared/schemas/room'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { unit: 'unitId' },
  body: RoomOrder,
  handle: ({ db, actor, unit, body }) => orderRooms(db, actor, unit, body),
})
