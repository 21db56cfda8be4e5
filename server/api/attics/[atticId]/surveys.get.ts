import { findKeptSurveys } from '../../../db/queries/surveys'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see record',
  on: { attic: 'atticId' },
  kept: true,
  handle: ({ db, attic }) => findKeptSurveys(db, attic.id),
})
