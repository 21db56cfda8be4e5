import { readTerms } from '../../../db/queries/storageTerms'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see attic',
  on: { attic: 'atticId' },
  kept: true,
  handle: ({ db, actor, attic }) => readTerms(db, actor, attic),
})
