import type { Db } from '../../server/db/connect'
import { addOrganisation, addUser, joinOrganisation } from '../../server/db/commands/addPerson'
import { SYSTEM_ACTOR } from '../../server/db/commands/appendRecord'
import type { Actor } from '../../server/db/queries/actor'
import { makePasswordHash } from '../../server/utils/passwords'
import { ORGANISATION, PEOPLE } from './scenario'

/** One password for every invented person; `npm start` prints it. */
export const DEMO_PASSWORD = 'lath and plaster'

export type Cast = Record<string, Actor>

/** The organisation and its people, each ready to act in the commands below. */
export async function plantPeople(db: Db): Promise<Cast> {
  const passwordHash = await makePasswordHash(DEMO_PASSWORD)
  return db.transaction().execute(async (trx) => {
    const organisationId = await addOrganisation(trx, { name: ORGANISATION.name, timeZone: ORGANISATION.timeZone, isDemo: true })
    await trx.updateTable('organisation').set({ contactPhone: ORGANISATION.contactPhone }).where('id', '=', organisationId).execute()
    const cast: Cast = {}
    for (const { key, name, email, role } of PEOPLE) {
      const user = await addUser(trx, { email, name, passwordHash })
      await joinOrganisation(trx, { ...SYSTEM_ACTOR, name: 'Demo' }, { organisationId, user, role })
      cast[key] = { userId: user.id, name, email, organisationId, role, unitIds: [], timeZone: ORGANISATION.timeZone }
    }
    return cast
  })
}
