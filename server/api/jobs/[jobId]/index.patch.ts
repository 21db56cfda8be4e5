import { editJob } from '../../../db/commands/editJob'
import { JobEdit } from '../../../../shared/schemas/job'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit job',
  on: { job: 'jobId' },
  body: JobEdit,
  handle: ({ db, actor, job, body }) => editJob(db, actor, job, body),
})
