import { reportObservation } from '../../../db/commands/reportObservation'
import { ObservationInput } from '../../../../shared/schemas/observation'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'report observation',
  on: { unit: 'unitId' },
  body: ObservationInput,
  handle: ({ db, actor, unit, clientKey, body }) => reportObservation(db, actor, unit, clientKey, body),
})
