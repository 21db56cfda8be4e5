import { moveReport } from '../../db/commands/moveReport'
import { ReportStep } from '../../../shared/schemas/reportStep'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'edit mark',
  on: { observation: 'observationId' },
  body: ReportStep,
  handle: ({ db, actor, observation, body }) => moveReport(db, actor, observation, body),
})
