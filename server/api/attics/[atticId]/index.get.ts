import { findGuessRecord } from '../../../db/queries/attics'
import { readAttic } from '../../../db/queries/readAttic'
import { apiRoute, abilitiesFor } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see attic',
  on: { attic: 'atticId' },
  kept: true,
  handle: async ({ db, actor, attic }) => {
    const [detail, guesses] = await Promise.all([readAttic(db, attic), findGuessRecord(db, actor)])
    return { ...detail, guesses, abilities: abilitiesFor(actor) }
  },
})
