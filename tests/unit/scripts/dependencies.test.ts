import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, expect, test } from 'vitest'
import { installDependencies, missingDependencies } from '../../../scripts/lib/dependencies.mjs'
import { createKeeper } from '../../../scripts/lib/keeper.mjs'

let root: string
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'lathkey-dependencies-'))
})
afterEach(() => rmSync(root, { recursive: true, force: true }))

const lock = (packages: Record<string, object>) => JSON.stringify({ packages: { '': { name: 'lathkey' }, ...packages } })

function write(wanted: Record<string, object>, present?: Record<string, object>, modules = join(root, 'node_modules')) {
  writeFileSync(join(root, 'package-lock.json'), lock(wanted))
  if (!present) return
  mkdirSync(modules, { recursive: true })
  writeFileSync(join(modules, '.package-lock.json'), JSON.stringify({ packages: present }))
}

test('without node_modules everything is missing', () => {
  write({ 'node_modules/pg': { version: '8.0.0' } })
  expect(missingDependencies(root)).toEqual(['pg'])
})

test('another version than the lock\'s is missing', () => {
  write({ 'node_modules/pg': { version: '8.1.0' }, 'node_modules/zod': { version: '4.0.0' } }, { 'node_modules/pg': { version: '8.0.0' }, 'node_modules/zod': { version: '4.0.0' } })
  expect(missingDependencies(root)).toEqual(['pg'])
})

test('optional packages of other platforms are not missed, nor what nothing needs', () => {
  write({
    'node_modules/pg': { version: '8.0.0' },
    'node_modules/fsevents': { version: '2.0.0', optional: true },
    'node_modules/left': { version: '1.0.0', extraneous: true },
  }, { 'node_modules/pg': { version: '8.0.0' } })
  expect(missingDependencies(root)).toEqual([])
})

test('what is up to date is not installed again', async () => {
  write({ 'node_modules/pg': { version: '8.0.0' } }, { 'node_modules/pg': { version: '8.0.0' } })
  const said: string[] = []
  await installDependencies({ root, keeper: createKeeper(), say: line => said.push(line) })
  expect(said).toEqual([])
})

test('a linked node_modules is never emptied: its owner is asked to install', async () => {
  const elsewhere = join(root, 'elsewhere')
  write({ 'node_modules/pg': { version: '8.0.0' } }, {}, elsewhere)
  symlinkSync(elsewhere, join(root, 'node_modules'))
  await expect(installDependencies({ root, keeper: createKeeper(), say: () => undefined })).rejects.toThrow(/is a link.*lacks pg/)
})

test('a copy without a lock file is refused', () => {
  expect(() => missingDependencies(root)).toThrow('not a complete copy')
})
