import { editTenancy } from '../../db/commands/createTenancy'
import { TenancyEdit } from '../../../shared/schemas/tenancy'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { tenancy: 'tenancyId' },
  body: TenancyEdit,
  handle: ({ db, actor, tenancy, body }) => editTenancy(db, actor, tenancy, body),
})
