import { InventoryListInput } from '../../../../shared/schemas/atticItem'
import { previewInventory } from '../../../db/commands/importInventory'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: InventoryListInput,
  handle: ({ db, actor, attic, body }) => previewInventory(db, actor, attic, body.csv),
})
