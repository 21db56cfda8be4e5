import { listPeople } from '../../db/queries/people'
import { PeopleQuery } from '../../../shared/schemas/invitation'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'manage people',
  query: PeopleQuery,
  handle: ({ db, actor, query }) => listPeople(db, actor, query),
})
