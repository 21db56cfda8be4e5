import type { Trx } from '../connect'
import { FIRST_HASH } from '../../utils/recordHash'

/**
 * Takes the lock of a unit's record chain until the commit: whoever judges or records in one unit does so one after another.
 * Commands that judge take it before any row, so that none waits for another crosswise.
 */
export async function lockUnit(trx: Trx, organisationId: string, unitId: string) {
  await trx.insertInto('recordChain').values({ chainId: unitId, organisationId, unitId, headHash: FIRST_HASH })
    .onConflict(conflict => conflict.column('chainId').doNothing()).execute()
  await trx.selectFrom('recordChain').select('chainId').where('chainId', '=', unitId).forUpdate().execute()
}
