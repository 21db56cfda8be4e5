import { addDays } from '../../../shared/utils/days'
import { DAYS_PER_YEAR, type TrendReading } from '../../../shared/utils/movement/series'
import { activeFromOn } from '../../../shared/utils/movement/trend'
import { normalOf, seeded } from './seeded'

/** How the readings of an invented mark are taken. */
export interface ReadingHabit {
  /** Days each reading may be early or late. */
  unevenDays: number
  /** Read to whole steps of this many mm; 0: as measured. */
  roundedToMm: number
  /** One reading in so many is mistyped: ten times too large or too small; 0: none. */
  mistypedOneIn: number
}

export const CAREFUL: ReadingHabit = { unevenDays: 0, roundedToMm: 0, mistypedOneIn: 0 }
export const HABITS: Record<string, ReadingHabit> = {
  'monthly, as measured': CAREFUL,
  'at uneven dates, up to 12 days off': { ...CAREFUL, unevenDays: 12 },
  'rounded to 1 mm': { ...CAREFUL, roundedToMm: 1 },
  'one in twelve mistyped': { ...CAREFUL, mistypedOneIn: 12 },
}

export interface InventedMovement { perYear: number, seasonPeakToPeak: number }

/** The readings' error of every simulation, as asked. */
export const SIGMA_MM = 0.25
const START_MM = 3

/** Monthly readings: steady growth, a yearly season of random phase, normal errors, taken after a habit. */
export function inventMark({ perYear, seasonPeakToPeak }: InventedMovement, months: number, uniform: () => number, habit = CAREFUL): TrendReading[] {
  const phase = uniform()
  const startOn = addDays('2025-01-01', Math.floor(uniform() * 365))
  return Array.from({ length: months }, (_, month) => {
    const day = Math.max(0, Math.round(month * DAYS_PER_YEAR / 12 + (uniform() * 2 - 1) * habit.unevenDays))
    const years = day / DAYS_PER_YEAR
    const season = seasonPeakToPeak / 2 * Math.sin(2 * Math.PI * (years + phase))
    const widthMm = START_MM + perYear * years + season + SIGMA_MM * normalOf(uniform)
    return { takenOn: addDays(startOn, day), value: takenDown(Math.max(0, widthMm), habit, uniform), sigma: SIGMA_MM }
  })
}

function takenDown(widthMm: number, { roundedToMm, mistypedOneIn }: ReadingHabit, uniform: () => number): number {
  const read = roundedToMm > 0 ? Math.round(widthMm / roundedToMm) * roundedToMm : widthMm
  if (mistypedOneIn === 0 || uniform() >= 1 / mistypedOneIn) return read
  return uniform() < 0.5 ? read * 10 : read / 10
}

/** Share of marks called active at any look in so many monthly readings. */
export function shareEverActive(movement: InventedMovement, { months, series, seed, habit = CAREFUL }: { months: number, series: number, seed: number, habit?: ReadingHabit }): number {
  const uniform = seeded(seed)
  return Array.from({ length: series }, () => activeFromOn(inventMark(movement, months, uniform, habit)) !== null).filter(Boolean).length / series
}
