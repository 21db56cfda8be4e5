import { setCodeBasis } from '../../../db/commands/setCodeBasis'
import { CodeBasisEdit } from '../../../../shared/schemas/codeBasis'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit homes',
  on: { property: 'propertyId' },
  body: CodeBasisEdit,
  handle: ({ db, actor, property, body }) => setCodeBasis(db, actor, property, body),
})
