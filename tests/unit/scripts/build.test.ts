import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, expect, test } from 'vitest'
import { fingerprintSources, isBuildStale } from '../../../scripts/lib/build.mjs'

let root: string
let output: string
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'lathkey-build-'))
  output = join(root, '.output')
  mkdirSync(join(root, 'pages/home'), { recursive: true })
  mkdirSync(join(root, 'tests'))
  writeFileSync(join(root, 'pages/home/index.vue'), 'one')
  writeFileSync(join(root, 'package.json'), '{}')
})
afterEach(() => rmSync(root, { recursive: true, force: true }))

function pretendBuild(fingerprint: string) {
  mkdirSync(join(output, 'server'), { recursive: true })
  writeFileSync(join(output, 'server/index.mjs'), '')
  writeFileSync(join(output, 'build-stamp.txt'), fingerprint)
}

test('without an output the build is stale', () => {
  expect(isBuildStale(output, fingerprintSources(root))).toBe(true)
})

test('an output made from these very sources is not stale', () => {
  pretendBuild(fingerprintSources(root))
  expect(isBuildStale(output, fingerprintSources(root))).toBe(false)
})

test.each([
  ['a changed page', () => writeFileSync(join(root, 'pages/home/index.vue'), 'two')],
  ['a new page', () => writeFileSync(join(root, 'pages/next.vue'), '')],
  ['a removed page', () => rmSync(join(root, 'pages/home/index.vue'))],
  ['a changed lock file', () => writeFileSync(join(root, 'package-lock.json'), '{}')],
])('%s makes the build stale', (_change, change) => {
  pretendBuild(fingerprintSources(root))
  change()
  expect(isBuildStale(output, fingerprintSources(root))).toBe(true)
})

test('a moved line between two files does not go unnoticed', () => {
  writeFileSync(join(root, 'pages/a.vue'), 'xy')
  writeFileSync(join(root, 'pages/b.vue'), 'z')
  const before = fingerprintSources(root)
  writeFileSync(join(root, 'pages/a.vue'), 'x')
  writeFileSync(join(root, 'pages/b.vue'), 'yz')
  expect(fingerprintSources(root)).not.toBe(before)
})

test('a changed test leaves the build as it is', () => {
  const before = fingerprintSources(root)
  writeFileSync(join(root, 'tests/some.test.ts'), '')
  expect(fingerprintSources(root)).toBe(before)
})

test('an output whose build was cut off has no stamp, so it is stale', () => {
  pretendBuild(fingerprintSources(root))
  rmSync(join(output, 'build-stamp.txt'))
  expect(isBuildStale(output, fingerprintSources(root))).toBe(true)
})
