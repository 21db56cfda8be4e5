import { findActor } from '../../db/queries/actor'
import { readMe } from '../../db/queries/accounts'
import { SwitchOrganisationInput } from '../../../shared/schemas/account'
import { apiRoute } from '../../utils/apiRoute'
import { notFound } from '../../utils/problems'
import { openSession, sessionIdentity } from '../../utils/session'

export default apiRoute({
  can: 'use account',
  body: SwitchOrganisationInput,
  async handle({ event, db, body }) {
    const identity = (await sessionIdentity(event))!
    const there = await findActor(db, identity, body.organisationId)
    if (!there) throw notFound()
    await openSession(event, { id: identity.userId, sessionEpoch: identity.epoch }, there.organisationId)
    return readMe(db, there)
  },
})
