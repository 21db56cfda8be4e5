import { findPropertyPage } from '../../../db/queries/properties'
import { PropertyQuery } from '../../../../shared/schemas/listQuery'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see property',
  on: { property: 'propertyId' },
  query: PropertyQuery,
  kept: true,
  handle: ({ db, actor, property, query }) => findPropertyPage(db, actor, property, query),
})
