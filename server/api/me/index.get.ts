import { readMe } from '../../db/queries/accounts'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'use account',
  kept: true,
  handle: ({ db, actor }) => readMe(db, actor),
})
