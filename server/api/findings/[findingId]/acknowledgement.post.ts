import { acknowledgeFinding } from '../../../db/commands/acknowledgeFinding'
import { AcknowledgementInput } from '../../../../shared/schemas/finding'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'acknowledge finding',
  on: { finding: 'findingId' },
  body: AcknowledgementInput,
  handle: ({ db, actor, finding, body }) => acknowledgeFinding(db, actor, finding, body),
})
