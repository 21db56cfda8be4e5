import type { UnloadTrialResult } from '../utils/movement/unloadTrial'
import type { MarkKind } from './mark'

export const UNLOAD_TRIAL_STATES = ['planned', 'unloaded', 'ended', 'given-up'] as const
export type UnloadTrialState = typeof UNLOAD_TRIAL_STATES[number]

export interface UnloadTrialRow {
  id: string
  version: number
  atticId: string
  atticName: string
  unitId: string
  unitName: string
  propertyName: string
  state: UnloadTrialState
  purpose: string
  plannedOn: string
  unloadedOn: string | null
  endedOn: string | null
  /** Of everything that is to be, or was, taken out. */
  weightLb: number
  markCount: number
}

export interface TrialItem { id: string, name: string, weightLb: number, removedOn: string | null }

export interface TrialMark { id: string, number: number, label: string, kind: MarkKind, roomName: string, result: UnloadTrialResult }

/** What GET /api/unload-trials/:id answers. */
export interface UnloadTrialView extends UnloadTrialRow {
  items: TrialItem[]
  marks: TrialMark[]
  conclusion: string
  createdByName: string
  createdAt: string
  /** Unloading comes before measuring: set when the attic is over its rating or on hold, or an urgent finding is open on it or on a watched mark. */
  unloadNow: boolean
  abilities: string[]
  today: string
}
