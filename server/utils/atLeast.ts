import { setTimeout as wait } from 'node:timers/promises'

/** The work's answer, never sooner than `ms`: two kinds of work that both need less cannot be told apart by their time. */
export async function atLeast<T>(ms: number, work: Promise<T>): Promise<T> {
  const [outcome] = await Promise.allSettled([work, wait(ms)])
  if (outcome.status === 'rejected') throw outcome.reason
  return outcome.value
}
