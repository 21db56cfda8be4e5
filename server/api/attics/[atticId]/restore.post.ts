import { VersionOnly } from '../../../../shared/schemas/attic'
import { restoreAttic } from '../../../db/commands/archiveAttic'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: VersionOnly,
  handle: ({ db, actor, attic, body }) => restoreAttic(db, actor, attic, body.version),
})
