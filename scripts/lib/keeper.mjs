import { readFileSync } from 'node:fs'
import { constants } from 'node:os'
import { startChild } from './children.mjs'

/**
 * Remembers what was started, and stops it in the opposite order, once.
 */
export function createKeeper() {
  /** @type {Set<() => Promise<void> | void>} */
  const stops = new Set()
  /** @type {Promise<void> | undefined} */
  let stopping

  /** @param {() => Promise<void> | void} stop */
  function add(stop) {
    if (stopping) void Promise.resolve(stop()).catch(() => { /* we are ending anyway */ })
    stops.add(stop)
    return () => stops.delete(stop)
  }

  async function stopEach() {
    for (const stop of [...stops].reverse()) {
      try {
        await stop()
      }
      catch (error) {
        console.error(`While stopping: ${error.message}`)
      }
    }
    stops.clear()
  }

  const stopAll = () => (stopping ??= stopEach())

  /**
   * Starts a program that stays until we stop.
   * @param {string} command
   * @param {string[]} parameters
   * @param {import('./children.mjs').ChildOptions} [options]
   */
  function start(command, parameters, options) {
    if (stopping) throw new Error('stopping')
    const started = startChild(command, parameters, options)
    add(started.stop)
    return started
  }

  /**
   * Runs a program to its end; stops with us. Answers its exit code.
   * @param {string} command
   * @param {string[]} parameters
   * @param {import('./children.mjs').ChildOptions} [options]
   */
  async function run(command, parameters, options) {
    if (stopping) throw new Error('stopping')
    const started = startChild(command, parameters, options)
    const forget = add(started.stop)
    const { code, error } = await started.exited
    forget()
    if (error) throw error
    return code ?? 1
  }

  return { add, start, run, stopAll, isStopping: () => stopping !== undefined }
}

/**
 * Ctrl-C and the usual stop signals end everything we started. So does the death of the npm that runs us.
 * @param {ReturnType<typeof createKeeper>} keeper
 * @param {(signal: 'SIGINT' | 'SIGTERM' | 'SIGHUP') => number} [exitCodeFor]
 */
export function stopOnSignals(keeper, exitCodeFor = signal => 128 + constants.signals[signal]) {
  const stopFor = signal => keeper.stopAll().then(() => process.exit(exitCodeFor(signal)))
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => stopFor(signal))
  if (process.env.npm_lifecycle_event === undefined) return
  const before = ancestry()
  setInterval(() => {
    if (ancestry() !== before) stopFor('SIGHUP')
  }, 1_000).unref()
}

/** Parent and grandparent: between npm and us there may be a shell that outlives npm. */
function ancestry() {
  try {
    return `${process.ppid} ${/^PPid:\s*(\d+)/m.exec(readFileSync(`/proc/${process.ppid}/status`, 'utf8'))?.[1]}`
  }
  catch {
    // The parent has just gone, or this system has no /proc.
    return String(process.ppid)
  }
}
