import { TermsSignatureInput } from '../../../../shared/schemas/atticItem'
import { signTerms } from '../../../db/commands/signTerms'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'sign terms',
  on: { attic: 'atticId' },
  body: TermsSignatureInput,
  handle: ({ db, actor, attic, body }) => signTerms(db, actor, attic, body),
})
