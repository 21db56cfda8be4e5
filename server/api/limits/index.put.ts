import { editLimits } from '../../db/commands/editLimits'
import { LimitsEdit } from '../../../shared/schemas/limits'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'manage organisation',
  body: LimitsEdit,
  handle: ({ db, actor, body }) => editLimits(db, actor, body),
})
