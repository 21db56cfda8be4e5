import { findUnloadTrialView } from '../../../db/queries/unloadTrials'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see unload trial',
  on: { unloadTrial: 'trialId' },
  handle: ({ db, actor, unloadTrial }) => findUnloadTrialView(db, actor, unloadTrial.id),
})
