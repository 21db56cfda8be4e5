import { readFileSync } from 'node:fs'
import { setTimeout as wait } from 'node:timers/promises'

/** Linux counts processor time in ticks of a hundredth of a second, whatever the processor (man 5 proc). */
const MS_PER_TICK = 10

/**
 * Processor time a process has used so far, in ms; undefined where the system does not tell.
 * @param {number | undefined} pid
 */
export function processorMs(pid) {
  try {
    // The second field is the name in brackets, and may hold spaces; user and system time are fields 14 and 15.
    const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ').at(-1).split(' ')
    return (Number(fields[11]) + Number(fields[12])) * MS_PER_TICK
  }
  catch {
    return undefined
  }
}

/** Waits until a process has finished what it was cut off in. @param {number | undefined} pid */
export async function waitUntilQuiet(pid, mostMs = 5_000) {
  const deadline = Date.now() + mostMs
  while (Date.now() < deadline) {
    const before = processorMs(pid)
    await wait(100)
    if ((processorMs(pid) ?? 0) - (before ?? 0) <= MS_PER_TICK) return
  }
}
