import { rehearseLimits } from '../../db/queries/rehearsal'
import { LimitsRehearsal } from '../../../shared/schemas/limits'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see ledger',
  body: LimitsRehearsal,
  handle: ({ db, actor, body }) => rehearseLimits(db, actor, body),
})
