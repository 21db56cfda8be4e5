import { InventoryConfirmation } from '../../../../shared/schemas/atticItem'
import { confirmInventory } from '../../../db/commands/changeItems'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'confirm inventory',
  on: { attic: 'atticId' },
  body: InventoryConfirmation,
  handle: ({ db, actor, attic, body }) => confirmInventory(db, actor, attic, body.confirmedOn),
})
