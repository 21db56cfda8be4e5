import { editUnit } from '../../../db/commands/editHome'
import { UnitEdit } from '../../../../shared/schemas/home'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { unit: 'unitId' },
  body: UnitEdit,
  handle: ({ db, actor, unit, body }) => editUnit(db, actor, unit, body),
})
