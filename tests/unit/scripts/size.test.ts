import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join, resolve } from 'node:path'
import { afterEach, beforeEach, expect, test } from 'vitest'
import { addressOfPage, chartMarker, chartScripts, firstLoadScripts, layoutModule, readClientManifest, sentBytes } from '../../../scripts/lib/sizeFirstLoad.mjs'
import { judgeSizes, limitBytes, measureSizes } from '../../../scripts/lib/sizeReport.mjs'

const script = (file: string) => ({ file, resourceType: 'script' })
const entry = script('entry.js')
const manifest = {
  entrypoints: ['app/entry.js'],
  dependencies: {
    'app/entry.js': { preload: { 'app/entry.js': entry, 'entry.css': { file: 'entry.css', resourceType: 'style' } } },
    'layouts/plain.vue': { preload: { 'layouts/plain.vue': script('plain.js'), 'app/entry.js': entry } },
    'layouts/default.vue': { preload: { 'layouts/default.vue': script('default.js'), 'app/entry.js': entry } },
    'pages/sign-in.vue': { preload: { 'pages/sign-in.vue': script('signIn.js'), '_form.js': script('form.js'), 'app/entry.js': entry } },
    'pages/report/[unitId].vue': { preload: { 'pages/report/[unitId].vue': script('report.js') } },
    'pages/homes/index.vue': { preload: { 'pages/homes/index.vue': script('homes.js') } },
    '_chart.js': { preload: { '_chart.js': script('chart.js') } },
  },
}

let root: string
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'lathkey-size-'))
  mkdirSync(join(root, 'public/_nuxt'), { recursive: true })
  mkdirSync(join(root, 'pages/report'), { recursive: true })
  for (const name of ['entry', 'plain', 'default', 'signIn', 'form', 'report', 'homes']) writeScript(name, 1_000)
  writeScript('chart', 200, `x.className="${chartMarker}"`)
  writeFileSync(join(root, 'pages/sign-in.vue'), '<script setup lang="ts">\ndefinePageMeta({ layout: \'plain\', public: true })\n</script>')
  writeFileSync(join(root, 'pages/report/[unitId].vue'), '<script setup lang="ts">\ndefinePageMeta({ validate: route => isId(route.params.unitId), layout: \'plain\' })\n</script>')
})
afterEach(() => rmSync(root, { recursive: true, force: true }))

function writeScript(name: string, zippedBytes: number, content = 'let a') {
  writeFileSync(join(root, `public/_nuxt/${name}.js`), content)
  writeFileSync(join(root, `public/_nuxt/${name}.js.gz`), 'z'.repeat(zippedBytes))
}

const measure = () => measureSizes({ root, outputDir: root, manifest })

test('the first load is the entry, the layout and the page with their static imports, each once and without styles', () => {
  expect(firstLoadScripts(manifest, ['layouts/plain.vue', 'pages/sign-in.vue'])).toEqual(['entry.js', 'form.js', 'plain.js', 'signIn.js'])
})

test('a module the build does not know is refused by name', () => {
  expect(() => firstLoadScripts(manifest, ['pages/none.vue'])).toThrow('pages/none.vue is not in this build')
})

test('a script counts as it is sent: zipped where the build zipped it, else as it lies there', () => {
  expect(sentBytes(root, 'entry.js')).toBe(1_000)
  writeFileSync(join(root, 'public/_nuxt/small.js'), 'abc')
  expect(sentBytes(root, 'small.js')).toBe(3)
})

test.each([
  ['definePageMeta({ layout: \'phone\' })', 'layouts/phone.vue'],
  ['definePageMeta({\n  middleware: [check()],\n  layout: \'plain\',\n})', 'layouts/plain.vue'],
  ['const a = 1', 'layouts/default.vue'],
])('of %j the layout is %s', (source, layout) => {
  expect(layoutModule(source)).toBe(layout)
})

test.each([
  ['pages/index.vue', '/'], ['pages/homes/index.vue', '/homes'], ['pages/report/[unitId].vue', '/report/[unitId]'], ['pages/report/[unitId]/index.vue', '/report/[unitId]'],
])('%s stands for %s', (module, address) => {
  expect(addressOfPage(module)).toBe(address)
})

test('both limited pages and their sizes are printed, and the limit itself is over the limit', () => {
  const good = judgeSizes(measure())
  expect(good.isGood).toBe(true)
  expect(good.lines.join('\n')).toMatch(/\/sign-in +4\.0 kB in 4 files, within the limit\n/)
  expect(good.lines.join('\n')).toMatch(/\/report\/\[unitId\] +3\.0 kB in 3 files, within the limit\n/)
  writeScript('signIn', limitBytes - 3_000)
  const over = judgeSizes(measure())
  expect(over.isGood).toBe(false)
  expect(over.lines.join('\n')).toMatch(/\/sign-in +125\.0 kB in 4 files, OVER THE LIMIT/)
  writeScript('signIn', limitBytes - 3_001)
  expect(judgeSizes(measure()).isGood).toBe(true)
})

test('another page may be large, and shows when every page is asked for', () => {
  writeScript('homes', 300_000)
  const { lines, isGood } = judgeSizes(measure(), { isEveryPageWanted: true })
  expect(isGood).toBe(true)
  expect(lines.join('\n')).toContain('/homes                        302.0 kB in 3 files\n')
})

test('a build without a limited page is not good', () => {
  const { 'pages/report/[unitId].vue': report, ...dependencies } = manifest.dependencies
  expect(report).toBeDefined()
  const { lines, isGood } = judgeSizes(measureSizes({ root, outputDir: root, manifest: { ...manifest, dependencies } }))
  expect(isGood).toBe(false)
  expect(lines.join('\n')).toContain('IS NOT IN THIS BUILD')
})

test('charts in the first load of any page are named and are not good', () => {
  const homes = { preload: { ...manifest.dependencies['pages/homes/index.vue'].preload, '_chart.js': script('chart.js') } }
  const report = measureSizes({ root, outputDir: root, manifest: { ...manifest, dependencies: { ...manifest.dependencies, 'pages/homes/index.vue': homes } } })
  const { lines, isGood } = judgeSizes(report)
  expect(isGood).toBe(false)
  expect(lines.at(-1)).toContain('CHARTS ARE IN THE FIRST LOAD OF /homes')
  expect(chartScripts(root, ['chart.js', 'entry.js'])).toEqual(['chart.js'])
})

test('the sign by which charts are known is in the chart library as it ships', () => {
  expect(readFileSync(resolve('node_modules/apexcharts/dist/apexcharts.common.js'), 'utf8')).toContain(chartMarker)
  expect(readFileSync(resolve('node_modules/apexcharts/dist/apexcharts.esm.js'), 'utf8')).toContain(chartMarker)
})

test('a folder without a build is refused with what to do', async () => {
  await expect(readClientManifest(root)).rejects.toThrow('Run "npm run build" first')
})
