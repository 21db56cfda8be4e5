import { createHash } from 'node:crypto'
import type { Trx } from '../connect'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'

export interface Checkpoint { madeOn: string, chains: number, entries: number, hash: string }

/**
 * SHA-256 over the heads of all record chains of an organisation, once a day. Printed in owners' digests, so that a copy
 * exists outside: whoever rewrote a chain later would have to change those letters too.
 */
export async function makeCheckpoint(trx: Trx, organisationId: string, madeOn: string): Promise<Checkpoint> {
  const chains = await trx.selectFrom('recordChain').select(['chainId', 'entries', 'headHash']).where('organisationId', '=', organisationId).orderBy('chainId').execute()
  const hash = createHash('sha256').update(chains.map(chain => `${chain.chainId} ${chain.entries} ${chain.headHash}\n`).join('')).digest('hex')
  const entries = chains.reduce((sum, chain) => sum + chain.entries, 0)
  await trx.insertInto('recordCheckpoint')
    .values({ id: newId(), organisationId, madeOn, chains: chains.length, entries, hash, createdAt: nowInstant() })
    .onConflict(conflict => conflict.columns(['organisationId', 'madeOn']).doNothing()).execute()
  return trx.selectFrom('recordCheckpoint').select(['madeOn', 'chains', 'entries', 'hash'])
    .where('organisationId', '=', organisationId).where('madeOn', '=', madeOn).executeTakeFirstOrThrow()
}
