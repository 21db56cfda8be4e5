import { spawn } from 'node:child_process'
import { existsSync } from 'node:fs'

const setpriv = ['/usr/bin/setpriv', '/bin/setpriv'].find(path => existsSync(path))

/**
 * @typedef {object} ChildOptions
 * @property {string} [cwd]
 * @property {Record<string, string | undefined>} [env]
 * @property {number} [uid]
 * @property {number} [gid]
 * @property {import('node:child_process').StdioOptions} [stdio]
 * @property {'SIGTERM' | 'SIGINT' | 'SIGQUIT'} [stopSignal]
 * @property {number} [graceMs] how long it may take to stop by itself
 */

/**
 * Starts a program in a process group of its own, so that Ctrl-C in the terminal does not reach it before we say so.
 * Where util-linux is present the kernel also ends it when we are killed outright.
 * @param {string} command
 * @param {string[]} parameters
 * @param {ChildOptions} [options]
 */
export function startChild(command, parameters, options = {}) {
  const { stopSignal = 'SIGTERM', graceMs = 8_000, ...spawnOptions } = options
  const line = setpriv
    ? [setpriv, '--pdeathsig', stopSignal.slice(3), '--', command, ...parameters]
    : [command, ...parameters]
  /** @type {import('node:child_process').ChildProcess} */
  const child = spawn(line[0], line.slice(1), { ...spawnOptions, detached: true })
  /** @type {Promise<{ code: number | null, signal: NodeJS.Signals | null, error?: Error }>} */
  const exited = new Promise((resolve) => {
    child.once('error', error => resolve({ code: null, signal: null, error }))
    child.once('exit', (code, signal) => resolve({ code, signal }))
  })
  const isRunning = () => child.pid !== undefined && child.exitCode === null && child.signalCode === null
  return { child, exited, isRunning, stop: () => stopGroup(child, exited, { isRunning, stopSignal, graceMs }) }
}

async function stopGroup(child, exited, { isRunning, stopSignal, graceMs }) {
  // The number of a process that has ended may belong to somebody else by now.
  if (!isRunning()) return
  signalGroup(child.pid, stopSignal)
  const timer = setTimeout(() => signalGroup(child.pid, 'SIGKILL'), graceMs)
  await exited
  clearTimeout(timer)
  // Grandchildren that outlived their parent are still in the group.
  signalGroup(child.pid, 'SIGKILL')
}

function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal)
  }
  catch (error) {
    if (error.code !== 'ESRCH' && error.code !== 'EPERM') throw error
  }
}

/** Whether a process with this id exists, whoever owns it. @param {number} pid */
export function isAlive(pid) {
  try {
    process.kill(pid, 0)
    return true
  }
  catch (error) {
    return error.code === 'EPERM'
  }
}
