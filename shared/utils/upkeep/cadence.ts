import { addMonths } from '../days'

/** Ours: a list of what is stored is confirmed once a year. */
export const INVENTORY_CONFIRM_MONTHS = 12

/** Common practice, no source: yearly and at turnover; half-yearly for ceilings with goods above. */
export const INSPECTION_MONTHS = { empty: 12, loaded: 6 } as const

export function inventoryDueOn(confirmedOn: string): string {
  return addMonths(confirmedOn, INVENTORY_CONFIRM_MONTHS)
}

export function inspectionDueOn(lastInspectedOn: string, loaded: boolean): string {
  return addMonths(lastInspectedOn, loaded ? INSPECTION_MONTHS.loaded : INSPECTION_MONTHS.empty)
}
