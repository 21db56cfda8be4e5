import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { isAlive } from './children.mjs'

function holderOf(file) {
  try {
    return Number(readFileSync(file, 'utf8'))
  }
  catch (error) {
    if (error.code === 'ENOENT') return undefined
    throw error
  }
}

/**
 * Takes a lock file that names its holder; one whose holder has died counts as free.
 * @param {string} file
 * @returns {(() => void) | undefined} how to give it back; undefined when another process holds it
 */
export function tryLock(file) {
  mkdirSync(dirname(file), { recursive: true })
  for (let attempt = 0; attempt < 3; attempt += 1) {
    try {
      writeFileSync(file, String(process.pid), { flag: 'wx' })
      return () => rmSync(file, { force: true })
    }
    catch (error) {
      if (error.code !== 'EEXIST') throw error
    }
    const holder = holderOf(file)
    // An empty file: its maker is between creating and writing.
    if (holder !== undefined && holder !== 0 && !isAlive(holder)) rmSync(file, { force: true })
    else if (holder !== undefined) return undefined
  }
  return undefined
}

/**
 * @template T
 * @param {string} file
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function withLock(file, work) {
  let release = tryLock(file)
  while (!release) {
    await wait(200)
    release = tryLock(file)
  }
  try {
    return await work()
  }
  finally {
    release()
  }
}
