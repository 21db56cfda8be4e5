import { VersionOnly } from '../../../../shared/schemas/attic'
import { archiveAttic } from '../../../db/commands/archiveAttic'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: VersionOnly,
  handle: ({ db, actor, attic, body }) => archiveAttic(db, actor, attic, body.version),
})
