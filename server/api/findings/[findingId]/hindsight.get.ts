import { listHindsight } from '../../../db/queries/ledger'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see finding',
  on: { finding: 'findingId' },
  handle: async ({ db, finding }) => ({ rows: await listHindsight(db, finding.id) }),
})
