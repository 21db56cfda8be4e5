import { InventoryImportInput } from '../../../../shared/schemas/atticItem'
import { importInventory } from '../../../db/commands/importInventory'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: InventoryImportInput,
  handle: ({ db, actor, attic, body, clientKey }) => importInventory(db, actor, attic, { ...body, clientKey }),
})
