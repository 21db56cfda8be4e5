import { listUnloadTrials } from '../../db/queries/unloadTrials'
import { UnloadTrialsQuery } from '../../../shared/schemas/unloadTrial'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see unload trial',
  query: UnloadTrialsQuery,
  handle: ({ db, actor, query }) => listUnloadTrials(db, actor, query),
})
