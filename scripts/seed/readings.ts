import type { DemoMark } from './scenario'

/** A small seeded generator (mulberry32, public domain), so that every demo tells the same story. */
export function seeded(seed: number) {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6D2B79F5) >>> 0
    let t = Math.imul(state ^ (state >>> 15), 1 | state)
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }
}

const YEAR_DAYS = 365.25
const RATES_MM_PER_YEAR: Record<DemoMark['pattern'], number> = { still: 0, season: 0, slow: 0.9, fast: 2.6, jump: 0 }

export interface DemoReading { daysAgo: number, value: number }

/** Dated readings of one mark, oldest first; the first is the report itself. Values in mm, or in pops. */
export function demoReadings(mark: DemoMark, random: () => number): DemoReading[] {
  const gaps = Math.max(1, mark.readings - 1)
  return Array.from({ length: mark.readings }, (_, i) => {
    const daysAgo = Math.round(mark.sinceDaysAgo - (mark.sinceDaysAgo - mark.lastDaysAgo) * i / gaps)
    const years = (mark.sinceDaysAgo - daysAgo) / YEAR_DAYS
    const season = mark.pattern === 'season' ? 0.5 * Math.cos(2 * Math.PI * daysAgo / YEAR_DAYS) : 0
    const jump = mark.pattern === 'jump' && i === mark.readings - 1 ? 9 : 0
    const noise = (random() + random() + random() - 1.5) * 0.25
    const value = mark.startMm + RATES_MM_PER_YEAR[mark.pattern] * years + season + jump + (mark.kind === 'crack' ? noise : 0)
    return { daysAgo, value: mark.kind === 'nail-pops' ? Math.round(value + 2 * RATES_MM_PER_YEAR[mark.pattern] * years) : Math.max(0.1, Math.round(value * 10) / 10) }
  })
}
