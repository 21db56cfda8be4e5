import { planUnloadTrial } from '../../../db/commands/planUnloadTrial'
import { UnloadTrialInput } from '../../../../shared/schemas/unloadTrial'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'run unload trial',
  on: { attic: 'atticId' },
  body: UnloadTrialInput,
  handle: ({ db, actor, attic, body }) => planUnloadTrial(db, actor, attic, body),
})
