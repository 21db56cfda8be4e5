import { editUnloadTrial } from '../../../db/commands/planUnloadTrial'
import { UnloadTrialEdit } from '../../../../shared/schemas/unloadTrial'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'run unload trial',
  on: { unloadTrial: 'trialId' },
  body: UnloadTrialEdit,
  handle: ({ db, actor, unloadTrial, body }) => editUnloadTrial(db, actor, unloadTrial, body),
})
