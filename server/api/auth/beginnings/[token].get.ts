import { readBeginning } from '../../../db/commands/beginOrganisation'
import type { Beginning } from '../../../../shared/types/people'
import { publicRoute } from '../../../utils/apiRoute'

export default publicRoute(async ({ event, db }): Promise<Beginning> => {
  const { email, name, organisationName, hasAccount } = await readBeginning(db, getRouterParam(event, 'token'))
  return { email, name, organisationName, hasAccount }
})
