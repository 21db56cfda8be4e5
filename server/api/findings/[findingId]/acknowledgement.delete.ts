import { returnFinding } from '../../../db/commands/acknowledgeFinding'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'acknowledge finding',
  on: { finding: 'findingId' },
  handle: ({ db, actor, finding }) => returnFinding(db, actor, finding),
})
