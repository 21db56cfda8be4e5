import type { LoadState } from '../../types/loadPlan'

/** Ours. */
export const NEAR_FROM = 0.8

/** Exactly 100 % is near; rounding in the sums does not make it over. */
export function loadStateOf(utilisation: number): LoadState {
  if (utilisation > 1 + 1e-9) return 'over'
  return utilisation >= NEAR_FROM ? 'near' : 'within'
}
