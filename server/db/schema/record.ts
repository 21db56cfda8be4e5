import type { Day, Defaulted, Instant, Json } from '../schema'

export interface RecordTables {
  recordChain: RecordChainTable
  recordEntry: RecordEntryTable
  recordCheckpoint: RecordCheckpointTable
  organisationChange: OrganisationChangeTable
}

export interface RecordChainTable {
  chainId: string
  organisationId: string
  unitId: string | null
  entries: Defaulted<number>
  headHash: string
}

export interface RecordEntryTable {
  id: string
  organisationId: string
  unitId: string | null
  chainId: string
  seq: number
  recordedAt: Instant
  actorId: string | null
  actorName: string
  action: string
  subjectKind: string
  subjectId: string
  before: Json<object> | null
  after: Json<object> | null
  previousHash: string
  hash: string
}

export interface RecordCheckpointTable {
  id: string
  organisationId: string
  madeOn: Day
  chains: number
  entries: number
  hash: string
  createdAt: Instant
}

/** Kept by triggers, read by queries/changes.ts. */
export interface OrganisationChangeTable {
  organisationId: string
  writerGroup: number
  changes: number
  byTransaction: string
}
