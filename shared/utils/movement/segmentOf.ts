export interface Repair { repairedOn: string, recordedAt: string }

/**
 * The segment a reading belongs to: one more than the repairs before it, by the day it was taken and not by the day it was entered.
 * On the day of a repair the order in which both arrived decides.
 */
export function segmentOf(reading: { takenOn: string, receivedAt: string }, repairs: readonly Repair[]): number {
  const before = repairs.filter(({ repairedOn, recordedAt }) =>
    repairedOn < reading.takenOn || (repairedOn === reading.takenOn && Date.parse(recordedAt) <= Date.parse(reading.receivedAt)))
  return before.length + 1
}
