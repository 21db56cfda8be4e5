import { listFindings } from '../../db/queries/findings'
import { FindingsQuery } from '../../../shared/schemas/finding'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see finding',
  query: FindingsQuery,
  kept: true,
  handle: ({ db, actor, query }) => listFindings(db, actor, query),
})
