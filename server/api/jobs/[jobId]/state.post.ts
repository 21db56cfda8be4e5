import { moveJob } from '../../../db/commands/moveJob'
import { JobMoveInput } from '../../../../shared/schemas/job'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'do job',
  on: { job: 'jobId' },
  body: JobMoveInput,
  handle: ({ db, actor, job, body }) => moveJob(db, actor, job, body),
})
