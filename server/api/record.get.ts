import { findRecordPage } from '../db/queries/record'
import { RecordQuery } from '../../shared/schemas/listQuery'
import { apiRoute } from '../utils/apiRoute'

/** What belongs to no unit: properties, people, settings. An engineer's reach is units, so the portfolio's ability is asked. */
export default apiRoute({
  can: 'see portfolio',
  query: RecordQuery,
  handle: ({ db, actor, query }) => findRecordPage(db, actor, actor.organisationId, query),
})
