#!/usr/bin/env node
import { join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { Refusal } from './lib/refusal.mjs'
import { readClientManifest } from './lib/sizeFirstLoad.mjs'
import { judgeSizes, measureSizes } from './lib/sizeReport.mjs'

const root = resolve(fileURLToPath(import.meta.url), '../..')
const parameters = process.argv.slice(2)
const isEveryPageWanted = parameters.includes('--all')
const folder = parameters.find(parameter => !parameter.startsWith('--'))
const outputDir = resolve(folder || process.env.LATHKEY_OUTPUT_DIR || join(root, '.output'))

try {
  const report = measureSizes({ root, outputDir, manifest: await readClientManifest(outputDir) })
  const { lines, isGood } = judgeSizes(report, { isEveryPageWanted })
  console.log(lines.join('\n'))
  process.exitCode = isGood ? 0 : 1
}
catch (error) {
  console.error(error instanceof Refusal ? error.message : error)
  process.exitCode = 1
}
