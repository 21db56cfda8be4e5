import { InventoryListQuery } from '../../../../shared/schemas/listQuery'
import { findItemsIn } from '../../../db/queries/attics'
import { apiRoute } from '../../../utils/apiRoute'
import { writeInventoryList } from '../../../utils/inventoryList'

/** What is stored, as a CSV file in the units asked for. */
export default apiRoute({
  can: 'see attic',
  on: { attic: 'atticId' },
  query: InventoryListQuery,
  handle: async ({ event, db, attic, query }) => {
    setResponseHeaders(event, { 'content-type': 'text/csv; charset=utf-8', 'content-disposition': 'attachment; filename="stored-in-attic.csv"' })
    return writeInventoryList(await findItemsIn(db, attic.id), query.units)
  },
})
