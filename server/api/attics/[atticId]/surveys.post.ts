import { AtticSurveyInput } from '../../../../shared/schemas/atticSurvey'
import { surveyAttic } from '../../../db/commands/surveyAttic'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: AtticSurveyInput,
  handle: ({ db, actor, attic, body }) => surveyAttic(db, actor, attic, body),
})
