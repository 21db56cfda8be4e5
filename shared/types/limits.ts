/** The limits of the movement rules an organisation may set for itself. */
export interface MovementLimits {
  /** A rise a season can make before a year of readings exists. */
  seasonAllowanceMm: number
  /** The same at interior wall corners under trusses. */
  trussAllowanceMm: number
  leastReadings: number
  leastDays: number
  /** The chance at which a rise counts as more than luck. */
  pRising: number
  dormantWithinMmPerYear: number
  /** A reading jumps when it is above the ones before by more than this … */
  leastJumpMm: number
  /** … and by more than so many standard uncertainties. */
  jumpSigmas: number
  /** So many more nail pops than at the least count are growth. */
  morePops: number
}

export type LimitName = keyof MovementLimits

export interface LimitBounds { ours: number, least: number, most: number, isWhole: boolean, unit: 'mm' | 'mm a year' | 'readings' | 'days' | 'pops' | 'standard uncertainties' | 'chance' }

/**
 * Defaults and bounds, all of them ours: no published limit exists for movement of ceilings. The bounds keep a limit from
 * silencing the rule altogether. Danger signs have no limit to set.
 */
export const MOVEMENT_LIMITS: Record<LimitName, LimitBounds> = {
  seasonAllowanceMm: { ours: 1.5, least: 0, most: 50, isWhole: false, unit: 'mm' },
  // Gaps up to ¾ in (19 mm) at interior walls under trusses are published (SBCA, partition separation); 20 is ours.
  trussAllowanceMm: { ours: 20, least: 0, most: 50, isWhole: false, unit: 'mm' },
  leastReadings: { ours: 6, least: 5, most: 24, isWhole: true, unit: 'readings' },
  leastDays: { ours: 90, least: 60, most: 365, isWhole: true, unit: 'days' },
  pRising: { ours: 0.01, least: 0.001, most: 0.05, isWhole: false, unit: 'chance' },
  dormantWithinMmPerYear: { ours: 0.5, least: 0.1, most: 2, isWhole: false, unit: 'mm a year' },
  leastJumpMm: { ours: 1, least: 0.3, most: 3, isWhole: false, unit: 'mm' },
  jumpSigmas: { ours: 4, least: 2, most: 6, isWhole: false, unit: 'standard uncertainties' },
  morePops: { ours: 3, least: 1, most: 10, isWhole: true, unit: 'pops' },
}

export const LIMIT_NAMES = Object.keys(MOVEMENT_LIMITS) as LimitName[]

export const OUR_LIMITS = Object.fromEntries(LIMIT_NAMES.map(name => [name, MOVEMENT_LIMITS[name].ours])) as unknown as MovementLimits

/** What GET /api/limits answers. */
export interface LimitsView {
  limits: MovementLimits
  /** Of the organisation: send it back with a change. */
  version: number
  abilities: string[]
}
