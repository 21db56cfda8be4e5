import { createJob } from '../../db/commands/createJob'
import { JobInput } from '../../../shared/schemas/job'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'edit job',
  body: JobInput,
  handle: ({ db, actor, body }) => createJob(db, actor, body),
})
