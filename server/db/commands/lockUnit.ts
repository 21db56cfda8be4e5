import { sql } from 'kysely'
import type { Trx } from '../connect'
import { FIRST_HASH } from '../../utils/recordHash'

/**
 * Takes the lock of a unit's record chain until the commit: whoever judges or records in one unit does so one after another.
 * Commands that judge take it before any row, so that none waits for another crosswise.
 */
export const lockUnit = (trx: Trx, organisationId: string, unitId: string) => lockUnits(trx, organisationId, [unitId])

/** The same for several units of one organisation, always in the order of their ids. */
export async function lockUnits(trx: Trx, organisationId: string, unitIds: string[]) {
  await sql`insert into record_chain (chain_id, organisation_id, unit_id, head_hash)
    select id, ${organisationId}, id, ${FIRST_HASH} from unnest(${unitIds}::uuid[]) as id order by id on conflict (chain_id) do nothing`.execute(trx)
  await sql`select chain_id from record_chain where chain_id = any(${unitIds}::uuid[]) order by chain_id for update`.execute(trx)
}
