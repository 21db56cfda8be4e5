/** Load duration factors, NDS 2018 Table 2.3.2: ten years for stored goods, permanent for what will stand longer. */
export const CD_TEN_YEARS = 1
export const CD_PERMANENT = 0.9

/** Dry service and ordinary temperature, NDS 2018 4.3.3 and 4.3.4; a wet member puts the rating on hold instead. */
export const CM_DRY = 1
export const CT_ORDINARY = 1

/** NDS 2018 4.3.9. */
export const REPETITIVE = { cr: 1.15, leastMembers: 3, greatestSpacingIn: 24 } as const

/** Repetitive member factor: three or more joists at 24 in or less, tied by a fastened ceiling or deck; else 1. */
export function repetitiveFactor(joistCount: number | null, spacingIn: number, tied: boolean): number {
  const holds = tied && joistCount !== null && joistCount >= REPETITIVE.leastMembers && spacingIn <= REPETITIVE.greatestSpacingIn
  return holds ? REPETITIVE.cr : 1
}

/** Creep factors for long-term deflection, NDS 2018 3.5.2. */
export const KCR_DRY = 1.5
export const KCR_GREEN_OR_DAMP = 2

/** Deflection limits for live load, IRC 2018 Table R301.7: ceilings with flexible finish (gypsum) and with plaster. */
export const DEFLECTION_DIVISOR_FLEXIBLE = 240
export const DEFLECTION_DIVISOR_PLASTER = 360

/** Bearing length taken when none is entered: the least on wood by IRC 2018 R502.6. */
export const BEARING_LENGTH_IN = 1.5
