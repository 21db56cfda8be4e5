import type { Trx } from '../connect'
import { lockUnit } from './lockUnit'
import { refuseArchived } from './refuseArchived'

export interface AtticRef { id: string, organisationId: string, unitId: string }

/** Whoever changes an attic waits for the others of its unit, and changes none that was archived meanwhile. */
export async function lockAttic(trx: Trx, attic: AtticRef) {
  await lockUnit(trx, attic.organisationId, attic.unitId)
  refuseArchived(await trx.selectFrom('attic').select('archivedAt').where('id', '=', attic.id).executeTakeFirstOrThrow(), 'attic')
}
