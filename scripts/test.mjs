#!/usr/bin/env node
import { existsSync, mkdirSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { ensureChromium } from './lib/chromium.mjs'
import { addCounts, noTests, oneCheck, summarize } from './lib/counts.mjs'
import { installDependencies } from './lib/dependencies.mjs'
import { createKeeper, stopOnSignals } from './lib/keeper.mjs'
import { checkNodeVersion } from './lib/nodeVersion.mjs'
import { ensurePoppler } from './lib/poppler.mjs'
import { Refusal } from './lib/refusal.mjs'
import { makeTestFolder } from './lib/testFolder.mjs'
import { bringUpTestCluster, buildForTests } from './lib/testServices.mjs'
import { checkSize, checkTypes, lint, prepareTypes, runProject } from './lib/testSteps.mjs'

const root = resolve(fileURLToPath(import.meta.url), '../..')
const parts = ['checks', 'unit', 'api', 'browser']
const keeper = createKeeper()
const say = line => console.log(line)
/** @type {import('./lib/counts.mjs').Counts[]} */
const counts = []

function chosenParts() {
  const asked = process.argv.slice(2)
  const unknown = asked.filter(part => !parts.includes(part))
  if (unknown.length > 0) throw new Refusal(`There is no part called ${unknown.join(', ')}. The parts are ${parts.join(', ')}; name none to run all.`)
  return new Set(asked.length > 0 ? asked : parts)
}

async function step(name, context, work) {
  const startedAt = Date.now()
  say(`\n— ${name}`)
  const result = await work(context)
  if (keeper.isStopping()) return
  counts.push(result)
  say(`  ${name}: ${result.failed === 0 ? 'good' : `${result.failed} failed`} (${((Date.now() - startedAt) / 1000).toFixed(1)} s)`)
}

async function runTests() {
  checkNodeVersion(root)
  const chosen = chosenParts()
  await installDependencies({ root, keeper, say })
  const folder = makeTestFolder(root, keeper)
  // Whatever a step leaves in the temporary folder goes with this run.
  process.env.TMPDIR = join(folder, 'tmp')
  mkdirSync(process.env.TMPDIR)
  const context = { root, folder, keeper, services: {} }
  await step('prepare', context, prepareTypes)
  if (chosen.has('checks')) {
    await Promise.all([step('lint', context, lint), step('types', context, checkTypes)])
  }
  if (chosen.has('unit')) await step('unit and reference', context, runProject('unit'))
  if (chosen.has('api') || chosen.has('browser')) await runOnBuiltServer(chosen, context)
}

async function runOnBuiltServer(chosen, context) {
  await step('database and build', context, async () => {
    const [cluster, entry] = await Promise.all([bringUpTestCluster({ folder: context.folder, keeper, say }), buildForTests({ root, keeper, say })])
    Object.assign(context.services, cluster, { TEST_SERVER_ENTRY: entry })
    return noTests
  })
  if (chosen.has('checks') && existsSync(join(root, 'scripts/size.mjs'))) await step('size', context, checkSize)
  await ensurePoppler({ keeper, say })
  if (chosen.has('api')) await step('api', context, runProject('api'))
  if (!chosen.has('browser')) return
  await ensureChromium({ keeper, say })
  await step('browser', context, runProject('browser'))
}

stopOnSignals(keeper)
try {
  await runTests()
}
catch (error) {
  if (!keeper.isStopping()) {
    console.error(error instanceof Refusal ? `\n${error.message}` : error)
    counts.push(oneCheck(false))
  }
}
if (!keeper.isStopping()) {
  await keeper.stopAll()
  const { line, isGood } = summarize(addCounts(counts))
  say(`\n${line}`)
  process.exit(isGood ? 0 : 1)
}
