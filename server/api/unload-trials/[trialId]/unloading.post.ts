import { carryOutUnloadTrial } from '../../../db/commands/carryOutUnloadTrial'
import { UnloadingInput } from '../../../../shared/schemas/unloadTrial'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'run unload trial',
  on: { unloadTrial: 'trialId' },
  body: UnloadingInput,
  handle: ({ db, actor, unloadTrial, body }) => carryOutUnloadTrial(db, actor, unloadTrial, body),
})
