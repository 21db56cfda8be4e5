import { addDays } from '../../../shared/utils/days'
import { DAYS_PER_YEAR, type TrendReading } from '../../../shared/utils/movement/series'

/** Uniform numbers from a fixed seed (the 32-bit "mulberry" generator, from memory). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6D2B79F5) >>> 0
    let t = state
    t = Math.imul(t ^ (t >>> 15), t | 1)
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61)
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }
}

/** A standard normal number by Box and Muller. */
export function normalOf(uniform: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform())
}

/** A plain series for tests: values on the given days after 1 Jan 2026. */
export function readingsOn(days: number[], values: number[], sigma = 0.2): TrendReading[] {
  return days.map((day, i) => ({ takenOn: addDays('2026-01-01', day), value: values[i]!, sigma }))
}

export function monthly(count: number, valueAt: (years: number) => number, sigma = 0.2): TrendReading[] {
  const days = Array.from({ length: count }, (_, month) => Math.round(month * DAYS_PER_YEAR / 12))
  return readingsOn(days, days.map(day => valueAt(day / DAYS_PER_YEAR)), sigma)
}
