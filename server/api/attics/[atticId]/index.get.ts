import { readAttic } from '../../../db/queries/readAttic'
import { apiRoute, abilitiesFor } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see attic',
  on: { attic: 'atticId' },
  kept: true,
  handle: async ({ db, actor, attic }) => ({ ...await readAttic(db, actor, attic), abilities: abilitiesFor(actor) }),
})
