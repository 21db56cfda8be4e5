import type { Db, Trx } from '../connect'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import type { ChainState } from '../../../shared/types/record'
import { FIRST_HASH, hashEntry, type RecordSubject } from '../../utils/recordHash'

/** Who did it; the system itself when no person asked. */
export interface RecordActor { userId: string | null, name: string }
export const SYSTEM_ACTOR: RecordActor = { userId: null, name: 'Daily review' }

export interface RecordChange extends RecordSubject {
  organisationId: string
  /** null: the entry belongs to no unit and goes on the organisation's own chain. */
  unitId: string | null
  /** What happened, in the past tense and plain words: 'item added', 'reading recorded'. */
  action: string
  before?: object | null
  after?: object | null
}

/**
 * Appends one entry to the chain of its unit (or of the organisation) in the caller's transaction.
 * The chain's row is locked until commit, so entries of one unit stand in one order; other units never wait.
 */
export async function appendRecord(trx: Trx, actor: RecordActor, change: RecordChange): Promise<{ id: string, seq: number, hash: string }> {
  const chainId = change.unitId ?? change.organisationId
  await trx.insertInto('recordChain')
    .values({ chainId, organisationId: change.organisationId, unitId: change.unitId, headHash: FIRST_HASH })
    .onConflict(conflict => conflict.column('chainId').doNothing()).execute()
  const chain = await trx.selectFrom('recordChain').selectAll().where('chainId', '=', chainId).forUpdate().executeTakeFirstOrThrow()
  const entry = {
    chainId, seq: chain.entries + 1, recordedAt: nowInstant(), actorId: actor.userId, actorName: actor.name,
    action: change.action, subjectKind: change.subjectKind, subjectId: change.subjectId,
    before: plain(change.before), after: plain(change.after), previousHash: chain.headHash,
  }
  const hash = hashEntry(entry)
  const id = newId()
  await trx.insertInto('recordEntry').values({
    id, organisationId: change.organisationId, unitId: change.unitId, ...entry,
    before: entry.before && JSON.stringify(entry.before), after: entry.after && JSON.stringify(entry.after), hash,
  }).execute()
  await trx.updateTable('recordChain').set({ entries: entry.seq, headHash: hash }).where('chainId', '=', chainId).execute()
  return { id, seq: entry.seq, hash }
}

/** As it will come back from jsonb: no undefined, dates as text. */
const plain = (value: object | null | undefined): object | null => value ? JSON.parse(JSON.stringify(value)) as object : null

/**
 * The first entry whose hash or link does not hold, or 'unbroken' with the count. Read from one snapshot: an entry
 * appended meanwhile must not look like a break.
 */
export function verifyChain(db: Db, chainId: string): Promise<ChainState> {
  if (db.isTransaction) return walkChain(db, chainId)
  return db.transaction().setIsolationLevel('repeatable read').setAccessMode('read only').execute(trx => walkChain(trx, chainId))
}

async function walkChain(db: Db, chainId: string): Promise<ChainState> {
  const chain = await db.selectFrom('recordChain').selectAll().where('chainId', '=', chainId).executeTakeFirst()
  let previous = FIRST_HASH
  let seq = 0
  for (;;) {
    const batch = await db.selectFrom('recordEntry').selectAll().where('chainId', '=', chainId).where('seq', '>', seq).orderBy('seq').limit(500).execute()
    for (const entry of batch) {
      if (entry.seq !== seq + 1) return { kind: 'broken', seq: seq + 1, why: 'an entry is missing' }
      if (entry.previousHash !== previous) return { kind: 'broken', seq: entry.seq, why: 'it does not follow from the entry before' }
      if (hashEntry(entry) !== entry.hash) return { kind: 'broken', seq: entry.seq, why: 'its content does not match its hash' }
      previous = entry.hash
      seq = entry.seq
    }
    if (batch.length === 0) break
  }
  if (chain && (chain.entries !== seq || chain.headHash !== previous)) return { kind: 'broken', seq: seq + 1, why: 'the chain is longer than its entries' }
  return { kind: 'unbroken', entries: seq }
}
