import { reportObservation } from '../../../db/commands/reportObservation'
import { PaperReportInput } from '../../../../shared/schemas/paperReport'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'enter paper report',
  on: { unit: 'unitId' },
  body: PaperReportInput,
  handle: ({ db, actor, unit, clientKey, body }) => reportObservation(db, actor, unit, clientKey, body.report, body.paper),
})
