import { endUnloadTrial } from '../../../db/commands/carryOutUnloadTrial'
import { UnloadTrialEnding } from '../../../../shared/schemas/unloadTrial'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'run unload trial',
  on: { unloadTrial: 'trialId' },
  body: UnloadTrialEnding,
  handle: ({ db, actor, unloadTrial, body }) => endUnloadTrial(db, actor, unloadTrial, body),
})
