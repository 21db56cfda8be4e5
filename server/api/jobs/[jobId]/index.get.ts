import { findJobView } from '../../../db/queries/jobs'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see job',
  on: { job: 'jobId' },
  kept: true,
  handle: ({ db, actor, job }) => findJobView(db, actor, job.id),
})
