import { withdrawDocument } from '../../../db/commands/keepDocument'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { document: 'documentId' },
  handle: ({ db, actor, document }) => withdrawDocument(db, actor, document),
})
