import { readLedger } from '../../db/queries/ledger'
import { LedgerQuery } from '../../../shared/schemas/hindsight'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see ledger',
  query: LedgerQuery,
  handle: ({ db, actor, query }) => readLedger(db, actor, query),
})
