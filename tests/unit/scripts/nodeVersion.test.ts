import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, expect, test } from 'vitest'
import { checkNodeVersion, isVersionInRange } from '../../../scripts/lib/nodeVersion.mjs'

const folder = mkdtempSync(join(tmpdir(), 'lathkey-node-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

const range = '>=20.19 <21 || >=22.12'

test.each([
  ['v20.19.0', true], ['v20.20.2', true], ['v22.12.0', true], ['v24.1.0', true],
  ['v20.18.9', false], ['v21.0.0', false], ['v18.20.4', false], ['v22.11.9', false],
])('%s lies in the range: %s', (version, expected) => {
  expect(isVersionInRange(version, range)).toBe(expected)
})

test('each comparison of npm\'s ranges is understood', () => {
  expect(['>20.1.0', '>=20.1.0', '<=20.1.0', '<20.1.0', '20.1.0', '=20.1.0'].map(part => isVersionInRange('v20.1.0', part)))
    .toEqual([false, true, true, false, true, true])
})

test('a range that cannot be read is a fault of package.json, said so', () => {
  expect(() => isVersionInRange('v20.19.0', '^20.19')).toThrow('engines.node')
})

test('too old a Node is refused with both versions named', () => {
  writeFileSync(join(folder, 'package.json'), JSON.stringify({ engines: { node: range } }))
  expect(() => checkNodeVersion(folder, 'v18.20.4')).toThrow(/needs Node >=20\.19.*This is Node v18\.20\.4/)
  expect(() => checkNodeVersion(folder, 'v20.20.2')).not.toThrow()
})
