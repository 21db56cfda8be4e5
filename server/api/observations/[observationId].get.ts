import { findReceipt } from '../../db/queries/observations'
import { abilitiesFor, apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'see mark',
  on: { observation: 'observationId' },
  kept: true,
  handle: async ({ db, actor, observation }) => ({ ...await findReceipt(db, observation.id), abilities: abilitiesFor(actor) }),
})
