import { createTenancy } from '../../../db/commands/createTenancy'
import { TenancyCreate } from '../../../../shared/schemas/tenancy'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { unit: 'unitId' },
  body: TenancyCreate,
  handle: ({ db, actor, unit, body }) => createTenancy(db, actor, unit, body),
})
