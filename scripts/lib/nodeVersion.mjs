import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { Refusal } from './refusal.mjs'

const numbersOf = version => version.replace(/^v/, '').split('-')[0].split('.').map(Number)

function compareVersions(left, right) {
  const [a, b] = [numbersOf(left), numbersOf(right)]
  for (let index = 0; index < 3; index += 1) {
    const difference = (a[index] ?? 0) - (b[index] ?? 0)
    if (difference !== 0) return difference
  }
  return 0
}

function meetsComparator(version, comparator) {
  const [, operator, bound] = /^(>=|<=|>|<|=?)(\d[\d.]*)$/.exec(comparator) ?? []
  if (bound === undefined) throw new Error(`package.json engines.node: cannot read "${comparator}"`)
  const difference = compareVersions(version, bound)
  if (operator === '>=') return difference >= 0
  if (operator === '<=') return difference <= 0
  if (operator === '>') return difference > 0
  if (operator === '<') return difference < 0
  return difference === 0
}

/**
 * Whether a version lies in a range such as ">=20.19 <21 || >=22.12".
 * @param {string} version
 * @param {string} range
 */
export function isVersionInRange(version, range) {
  return range.split('||').some(part => part.trim().split(/\s+/).every(comparator => meetsComparator(version, comparator)))
}

/** @param {string} root the folder that holds package.json */
export function checkNodeVersion(root, version = process.version) {
  const range = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')).engines.node
  if (isVersionInRange(version, range)) return
  throw new Refusal(`Lathkey needs Node ${range}. This is Node ${version}. Install a version in that range, then run the command again.`)
}
