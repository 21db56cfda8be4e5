import type { OrganisationChanges } from '../../../shared/schemas/organisation'
import type { OrganisationSettings } from '../../../shared/types/organisation'
import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import { findSettings } from '../queries/organisations'
import { editRow } from './editRow'

export async function editOrganisation(db: Db, actor: Actor, { version, ...patch }: OrganisationChanges): Promise<OrganisationSettings> {
  await db.transaction().execute(trx => editRow(trx, actor, {
    table: 'organisation', id: actor.organisationId, version, patch,
    record: { organisationId: actor.organisationId, unitId: null, subjectKind: 'organisation', action: 'settings changed' },
  }))
  return findSettings(db, actor)
}
