import { judgeHindsight } from '../../../db/commands/judgeHindsight'
import { HindsightInput } from '../../../../shared/schemas/hindsight'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'judge finding',
  on: { finding: 'findingId' },
  body: HindsightInput,
  handle: ({ db, actor, finding, body }) => judgeHindsight(db, actor, finding, body),
})
