import { listJobs } from '../../db/queries/jobs'
import { JobsQuery } from '../../../shared/schemas/job'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see job',
  query: JobsQuery,
  kept: true,
  handle: ({ db, actor, query }) => listJobs(db, actor, query),
})
