import { defineStore } from 'pinia'
import { keptDrafts } from './keptDrafts'

export interface TrialSpot { fieldNumber?: number, xFt?: number, yFt?: number, lengthFt?: number, widthFt?: number }
/** Item id → where it is tried out. */
export type TrialMoves = Record<string, TrialSpot>

const MEASURES = ['fieldNumber', 'xFt', 'yFt', 'lengthFt', 'widthFt'] as const

function readMoves(value: object): TrialMoves {
  return Object.fromEntries(Object.entries(value as Record<string, unknown>).flatMap(([id, spot]) => {
    if (typeof spot !== 'object' || spot === null) return []
    const sound = Object.entries(spot).filter(([key, ft]) => MEASURES.some(measure => measure === key) && typeof ft === 'number')
    return sound.length > 0 ? [[id, Object.fromEntries(sound)]] : []
  }))
}

/** Moves tried out on the load plan of this browser and not yet saved. */
export const usePlanDraft = defineStore('planDraft', () => keptDrafts('lathkey.plan-drafts', readMoves))
