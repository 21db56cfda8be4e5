import { sql } from 'kysely'
import type { Db, Trx } from '../connect'
import { insertRows, rowSet } from '../rowSet'
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

type Appended = { id: string, seq: number, hash: string }

/**
 * Appends one entry to the chain of its unit (or of the organisation) in the caller's transaction.
 * The chain's row is locked until commit, so entries of one unit stand in one order; other units never wait.
 */
export async function appendRecord(trx: Trx, actor: RecordActor, change: RecordChange): Promise<Appended> {
  const [appended] = await appendRecords(trx, actor, [change])
  return appended!
}

const chainIdOf = (change: RecordChange) => change.unitId ?? change.organisationId

/** The same for many at once, on as many chains as they belong to; entries of one chain in the order given. */
export async function appendRecords(trx: Trx, actor: RecordActor, changes: readonly RecordChange[]): Promise<Appended[]> {
  if (changes.length === 0) return []
  const chains = await lockChains(trx, changes)
  const recordedAt = nowInstant()
  const entries = changes.map((change) => {
    const chain = chains.get(chainIdOf(change))!
    const entry = {
      chainId: chain.chainId, seq: chain.entries + 1, recordedAt, actorId: actor.userId, actorName: actor.name,
      action: change.action, subjectKind: change.subjectKind, subjectId: change.subjectId,
      before: plain(change.before), after: plain(change.after), previousHash: chain.headHash,
    }
    const hash = hashEntry(entry)
    Object.assign(chain, { entries: entry.seq, headHash: hash })
    return { id: newId(), organisationId: change.organisationId, unitId: change.unitId, ...entry, hash }
  })
  await insertRows(trx, 'recordEntry', entries, ENTRY_COLUMNS)
  await sql`update record_chain c set entries = v.entries, head_hash = v.head_hash
    from ${rowSet([...chains.values()], { chainId: 'uuid', entries: 'integer', headHash: 'text' })} where c.chain_id = v.chain_id`.execute(trx)
  return entries.map(({ id, seq, hash }) => ({ id, seq, hash }))
}

const ENTRY_COLUMNS = {
  id: 'uuid', organisationId: 'uuid', unitId: 'uuid', chainId: 'uuid', seq: 'integer', recordedAt: 'timestamptz', actorId: 'uuid', actorName: 'text', action: 'text',
  subjectKind: 'text', subjectId: 'uuid', before: 'jsonb', after: 'jsonb', previousHash: 'text', hash: 'text',
} as const

/** In the order of their ids, so that two who lock several never wait for each other crosswise. */
async function lockChains(trx: Trx, changes: readonly RecordChange[]) {
  const missing = new Map(changes.map(change => [chainIdOf(change), { chainId: chainIdOf(change), organisationId: change.organisationId, unitId: change.unitId, headHash: FIRST_HASH }]))
  await sql`insert into record_chain (chain_id, organisation_id, unit_id, head_hash) select chain_id, organisation_id, unit_id, head_hash
    from ${rowSet([...missing.values()], { chainId: 'uuid', organisationId: 'uuid', unitId: 'uuid', headHash: 'text' })} order by chain_id on conflict (chain_id) do nothing`.execute(trx)
  const { rows } = await sql<{ chainId: string, entries: number, headHash: string }>`
    select chain_id, entries, head_hash from record_chain where chain_id = any(${[...missing.keys()]}::uuid[]) order by chain_id for update`.execute(trx)
  return new Map(rows.map(row => [row.chainId, row]))
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
