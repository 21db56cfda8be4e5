import type { Day, Defaulted, Instant } from '../schema'

export interface TrialTables {
  unloadTrial: UnloadTrialTable
  unloadTrialItem: UnloadTrialItemTable
  unloadTrialMark: UnloadTrialMarkTable
}

export interface UnloadTrialTable {
  id: string
  organisationId: string
  unitId: string
  atticId: string
  purpose: string
  state: Defaulted<'planned' | 'unloaded' | 'ended' | 'given-up'>
  plannedOn: Day
  unloadedOn: Day | null
  endedOn: Day | null
  conclusion: Defaulted<string>
  createdBy: string
  createdAt: Instant
  version: Defaulted<number>
}

export interface UnloadTrialItemTable { trialId: string, organisationId: string, itemId: string }

export interface UnloadTrialMarkTable { trialId: string, organisationId: string, markId: string }
