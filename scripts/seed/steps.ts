import { daysBack, setDemoDay } from './demoClock'

/** How long ago the demo's records begin. */
export const HOUSE_AGE_DAYS = 520

/** One thing that happened on one day of the demo's past. */
export interface Step { daysAgo: number, run: (on: string) => Promise<void> }

/** Plays every step in the order of time, the program's clock standing on its day. */
export async function playSteps(today: string, steps: readonly Step[]) {
  const ordered = [...steps].sort((a, b) => b.daysAgo - a.daysAgo)
  let minute = 0
  for (const [i, step] of ordered.entries()) {
    minute = step.daysAgo === ordered[i - 1]?.daysAgo ? minute + 1 : 0
    const on = daysBack(today, step.daysAgo)
    setDemoDay(on, minute)
    await step.run(on)
  }
}
